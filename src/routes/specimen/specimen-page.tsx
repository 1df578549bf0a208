import { useState } from 'react';
import { changes, verdicts } from '../../../shared/schemas/words.ts';
import { DigitStrip } from '../../components/digit-strip/digit-strip.tsx';
import { LargeStrip } from '../../components/digit-strip/large-strip.tsx';
import { StripHeader } from '../../components/digit-strip/strip-header.tsx';
import { StripPair } from '../../components/digit-strip/strip-pair.tsx';
import { describeStrip } from '../../components/digit-strip/strip-words.ts';
import { ChangeMark } from '../../components/marks/change-mark.tsx';
import { ChangeWord } from '../../components/marks/change-word.tsx';
import { Gauge } from '../../components/marks/gauge.tsx';
import { Tally } from '../../components/marks/tally.tsx';
import { VerdictWord } from '../../components/marks/verdict-word.tsx';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { Button } from '../../components/ui/button.tsx';
import { Choice } from '../../components/ui/choice.tsx';
import { Field } from '../../components/ui/field.tsx';
import { FilterWord } from '../../components/ui/filter-word.tsx';
import { LoadingStrokes } from '../../components/ui/loading-strokes.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { bisection, newton, problems, record, secant, secantForgetful } from './small-solvers.ts';

const samples = [
  {
    name: 'secant on sqrt-three',
    strip: record(secant, problems.sqrtThree, [1, 2]),
    what: 'gaps grow by 1.6',
  },
  {
    name: 'secant, stored value lost',
    strip: record(secantForgetful, problems.sqrtThree, [1, 2]),
    what: 'each earlier x asked again: feet',
  },
  { name: 'newton on steep-20', strip: record(newton, problems.steep, [2]), what: 'f and f′: a prime above' },
  {
    name: 'bisection on sqrt-three',
    strip: record(bisection, problems.sqrtThree, [1, 2]),
    what: 'an even comb',
  },
  {
    name: 'newton on cubic-out',
    strip: record(newton, problems.cubicOut, [2]),
    what: 'attainable 5.2 digits: dotted beyond',
  },
  { name: 'secant on triple', strip: record(secant, problems.triple, [0, 2]), what: 'refused: open end' },
  {
    name: 'newton on two-cycle',
    strip: record(newton, problems.twoCycle, [0]),
    what: 'two x’s over and over',
  },
  {
    name: 'bisection on flat-shoulder',
    strip: record(bisection, problems.flatShoulder, [-1, 5]),
    what: 'no digit yet: the left gutter',
  },
];

const pair = {
  reference: record(secant, problems.oldCubic, [0, 3]),
  candidate: record(secantForgetful, problems.oldCubic, [0, 3]),
};

/** Marks, strips, type and controls alone, for whoever works on them. Not part of a built client. */
export function SpecimenPage() {
  const [pressed, setPressed] = useState(true);
  const [choice, setChoice] = useState<'accept' | 'decline' | null>('accept');
  return (
    <Page title="Specimen" trail={[{ label: 'Specimen: marks, strips, controls, states' }]}>
      <Entry title="Change marks" note="Word, then shape, then colour.">
        <ul className="grid grid-cols-4 gap-x-8.5 max-wide:grid-cols-2">
          {changes.map((change) => (
            <li key={change} className="flex items-center gap-3 border-b border-rule py-2">
              <ChangeMark change={change} size={28} />
              <ChangeWord change={change} count={3} />
            </li>
          ))}
        </ul>
        <p className="mt-3 flex flex-wrap gap-2">
          In one colour:
          {changes.map((change) => (
            <ChangeMark key={change} change={change} isPlain />
          ))}
        </p>
        <p className="mt-3 flex flex-wrap gap-5">
          {verdicts.map((verdict) => (
            <VerdictWord key={verdict} verdict={verdict} />
          ))}
          <Gauge percent={68.8} allowance={2} />
          <Gauge percent={-7.3} allowance={2} />
          <Tally
            strokes={[
              'done',
              'done',
              'failed',
              'done',
              'done',
              'done',
              'now',
              'waiting',
              'waiting',
              'waiting',
            ]}
          />
        </p>
      </Entry>
      <Entry title="Strips, row size" note="20 px high, 196 px wide.">
        <StripHeader />
        <ul>
          {samples.map((sample) => (
            <li key={sample.name} className="flex flex-wrap items-center gap-x-6 border-b border-rule py-1.5">
              <DigitStrip strip={sample.strip} />
              <span className="w-[200px]">{sample.name}</span>
              <span className="text-ink-3">
                {sample.what}; “{describeStrip(sample.strip)}”
              </span>
            </li>
          ))}
          <li className="border-b border-rule py-1.5">
            <StripPair reference={pair.reference} candidate={pair.candidate} />
          </li>
        </ul>
      </Entry>
      <Entry title="Strip, large">
        <LargeStrip
          attainable={problems.oldCubic.attainable}
          rows={[
            { label: 'reference', strip: pair.reference, isReference: true },
            { label: 'candidate', strip: pair.candidate, isReference: false },
          ]}
        />
      </Entry>
      <Entry title="Controls">
        <div className="flex flex-wrap items-center gap-x-5.5 gap-y-3">
          <Button isMain hotkey="b">
            Find the commit
          </Button>
          <Button hotkey="e">Export</Button>
          <Button disabled>Not yours to decide</Button>
          <TextAction hotkey="p">Propose</TextAction>
          <Choice
            legend="Decision"
            name="decision"
            options={[
              { value: 'accept', label: 'accept' },
              { value: 'decline', label: 'decline' },
            ]}
            value={choice}
            onChange={setChoice}
          />
          <FilterWord
            word="costlier"
            count={14}
            mark={<ChangeMark change="costlier" />}
            colour="text-worse"
            isPressed={pressed}
            onPress={() => setPressed(!pressed)}
          />
          <Field
            label="Reason"
            placeholder="why not"
            problem="A declined entry needs a reason: one sentence."
          />
        </div>
      </Entry>
      <Entry title="States">
        <div className="grid grid-cols-3 gap-x-8.5 max-wide:grid-cols-1">
          <StateNote title="No pair matches" actions={<Button hotkey="x">Clear the filter</Button>}>
            No changed pair has this trait.
          </StateNote>
          <LoadingStrokes label="Reading the solves" />
          <StateNote isProblem title="Could not tell" actions={<Button>Try again</Button>}>
            The build did not prepare.
          </StateNote>
        </div>
      </Entry>
    </Page>
  );
}

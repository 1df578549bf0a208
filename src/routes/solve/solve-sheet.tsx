import { useMemo } from 'react';
import { Link, useNavigate } from 'react-router';
import { isRightlyRefused } from '../../../shared/numerics/judge-claim.ts';
import type { AllowanceRevisionView } from '../../../shared/schemas/allowance-revisions.ts';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { RunDetail, SolveDetail } from '../../../shared/schemas/runs.ts';
import { LargeStrip, type LargeStripRow } from '../../components/digit-strip/large-strip.tsx';
import { ChangeWord } from '../../components/marks/change-word.tsx';
import { changeColour } from '../../components/marks/change-words.ts';
import { OutcomeWord } from '../../components/marks/outcome-word.tsx';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { RichText } from '../../components/ui/rich-text.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { HomeCommand } from '../../features/solves/home-command.tsx';
import { homeLines } from '../../features/solves/home-lines.ts';
import { pathRows } from '../../features/solves/path-rows.ts';
import { PathTable } from '../../features/solves/path-table.tsx';
import { findingRows } from '../../features/solves/query-findings.ts';
import { SolveFacts } from '../../features/solves/solve-facts.tsx';
import { pairOfSolves, pairSentence } from '../../features/solves/solve-pair.ts';
import { aloneSentence, pairLead } from '../../features/solves/solve-sentence.ts';
import { type SolveSide, solveSide } from '../../features/solves/solve-side.ts';
import { allowanceSummary } from '../../lib/allowance-words.ts';
import { formatCommit } from '../../lib/format.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { useViewState } from '../../lib/use-view-state.ts';
import { paths } from '../../paths.ts';
import { SolvePlots } from './solve-plots.tsx';

export interface SolveSheetProps {
  solve: SolveDetail;
  reference: SolveDetail | null;
  run: RunDetail;
  suiteCase: SuiteCase;
  /** The run of the reference's solve, and the allowances that the pair is judged by. */
  referenceRun: RunDetail | null;
  allowances: AllowanceRevisionView | null;
  /** Whether the suite comes with the product. */
  isBuiltInSuite: boolean;
  /** Where Escape leads: the comparison or the run that the reader came from. */
  backTo: string;
}

function stripRow(side: SolveSide, label: string, isReference: boolean): LargeStripRow[] {
  return side.picture.kind === 'strip'
    ? [{ label, strip: side.picture.strip, isReference, evaluations: side.solve.evaluations }]
    : [];
}

function jumpTo(step: 'first' | 'next'): void {
  const rows = [...document.querySelectorAll<HTMLElement>('tr[data-differs]')];
  const at = rows.findIndex((row) => row.matches(':focus'));
  const row = step === 'first' ? rows[0] : (rows[at + 1] ?? rows[0]);
  row?.focus();
  row?.scrollIntoView({ block: 'center' });
}

/** A solve, alone or beside the reference's: strips, path, plots, query check, the command to repeat it. */
export function SolveSheet(props: SolveSheetProps) {
  const { solve, reference, run, suiteCase, backTo, referenceRun, allowances } = props;
  const view = useViewState();
  const navigate = useNavigate();
  const isHex = view.get('bits') === 'hex';
  const candidateSide = useMemo(() => solveSide(solve, suiteCase), [solve, suiteCase]);
  const referenceSide = useMemo(
    () => (reference === null ? null : solveSide(reference, suiteCase)),
    [reference, suiteCase],
  );
  const rows = useMemo(() => pathRows(referenceSide, candidateSide), [referenceSide, candidateSide]);
  useKeys({
    d: () => jumpTo('first'),
    n: () => jumpTo('next'),
    x: () => view.set({ bits: isHex ? '' : 'hex' }),
    escape: () => void navigate(backTo),
  });
  // Where one of the two has not been said, it is taken for the other's: nothing is known against it.
  const prints = [run.environment?.fingerprint, referenceRun?.environment?.fingerprint];
  const isExact = prints.includes(undefined) || prints[0] === prints[1];
  const pair = useMemo(
    () =>
      reference === null || allowances === null
        ? null
        : pairOfSolves(reference, solve, suiteCase, { allowances: allowances.allowances, isExact }),
    [reference, solve, suiteCase, allowances, isExact],
  );
  const attainable = candidateSide.picture.kind === 'strip' ? candidateSide.picture.strip.attainable : null;
  const strips = [
    ...(referenceSide === null ? [] : stripRow(referenceSide, 'reference', true)),
    ...stripRow(candidateSide, referenceSide === null ? solve.solver : 'candidate', false),
  ];
  const said = solve.remarks.filter((remark) => !['rightly refused', 'path cut'].includes(remark.code));
  const hasRoots = suiteCase.roots.length > 0;
  const name = `${solve.solver} on ${solve.case}`;
  const isOneOfMany = solve.start !== null && suiteCase.starts.length > 1;
  const command = homeLines({
    solver: solve.solver,
    case: solve.case,
    start: isOneOfMany ? (solve.start ?? 0) + 1 : null,
    suite: run.suite.slug,
    isBuiltIn: props.isBuiltInSuite,
    isFresh: run.settings.fresh,
  }).join('\n');
  return (
    <Page
      title={name}
      trail={[
        { label: run.library, to: paths.library(run.library) },
        {
          label: `Build ${formatCommit(run.build.commit ?? run.build.label)}`,
          to: paths.build(run.build.id),
        },
        { label: `Run ${run.id}`, to: paths.run(run.id) },
        { label: name },
      ]}
      keys={[
        ...(reference === null
          ? []
          : [
              { keys: ['d'], does: 'to the first difference' },
              { keys: ['n'], does: 'next difference' },
            ]),
        { keys: ['x'], does: isHex ? 'decimal figures' : 'exact hexadecimal' },
        { keys: ['[', ']'], does: 'walk through the evaluations' },
        { keys: ['z'], does: 'close up' },
        { keys: ['y'], does: 'copy the command' },
        { keys: ['esc'], does: 'back' },
      ]}
    >
      <VerdictBlock
        sign={
          pair === null ? (
            <OutcomeWord outcome={solve.outcome} isRightlyRefused={isRightlyRefused(solve)} />
          ) : (
            <ChangeWord change={pair.change} />
          )
        }
        colour={pair === null ? undefined : changeColour[pair.change]}
        note={
          pair === null || allowances === null ? undefined : (
            <>
              {pair.others.length > 0 && (
                <p className="flex flex-wrap gap-x-3">
                  {pair.others.map((other) => (
                    <ChangeWord key={other} change={other} />
                  ))}
                </p>
              )}
              <p>{allowanceSummary(allowances.number, allowances.allowances.base)}</p>
            </>
          )
        }
        sentence={<RichText pieces={pair === null ? aloneSentence(solve) : pairSentence(pair, solve)} />}
        lead={
          reference === null
            ? said.map((remark) => remark.text).join(' ') || undefined
            : `${pairLead(reference, solve, solve.declaration.order)} ${said.map((remark) => remark.text).join(' ')}`
        }
      >
        <SolveFacts
          solve={solve}
          suiteCase={suiteCase}
          caseHref={paths.suiteCase(run.suite.slug, suiteCase.id, run.suite.revision)}
          budget={run.settings.evaluations}
        />
        {!isExact && (
          <p className="mt-3 max-w-[60em] border-l-3 border-ink pl-3">
            Other arithmetic: the two were measured with different fingerprints, so last places may differ
            without a change in the build, and <b>drifted</b> is not told.{' '}
            <Link to={paths.guideChapter('fingerprint')}>What the fingerprint is</Link>
          </p>
        )}
      </VerdictBlock>
      <Entry
        title="Digit strip"
        note={
          <p>
            One stroke an evaluation, at the correct digits its x has. A foot below the line: asked again at
            the same x.
          </p>
        }
      >
        {strips.length > 0 ? (
          <LargeStrip rows={strips} attainable={attainable} />
        ) : (
          <StateNote title={hasRoots ? 'No path was kept' : 'No root to measure against'}>
            {hasRoots
              ? 'Counts and roots can be read, lines cannot.'
              : `${suiteCase.id} has no certified root, so no digits are drawn. Refusing is right here and counts as rightly refused.`}
          </StateNote>
        )}
      </Entry>
      <Entry title="Path">
        <p className="text-note leading-[20px] text-ink-3">
          {referenceSide === null
            ? 'Every evaluation in order, with the correct digits of its x. The stroke at the right stands at them.'
            : 'Places that differ are underlined. A dot: the other build asked here, this one did not. The stroke at the right stands at the correct digits.'}
        </p>
        <p className="no-print flex flex-wrap gap-x-5.5 text-table">
          <TextAction hotkey="x" aria-pressed={isHex} onClick={() => view.set({ bits: isHex ? '' : 'hex' })}>
            {isHex ? 'decimal figures' : 'the exact bits'}
          </TextAction>
          {reference !== null && (
            <TextAction hotkey="d" onClick={() => jumpTo('first')}>
              to the first difference
            </TextAction>
          )}
        </p>
      </Entry>
      <section className="ledger pt-2" aria-label="Path, line by line">
        <div className="max-wide:hidden" />
        <div className="min-w-0">
          {rows.length === 0 ? (
            <StateNote title="Nothing was asked">The solver ended before it asked for a value.</StateNote>
          ) : (
            <PathTable rows={rows} reference={referenceSide} candidate={candidateSide} isHex={isHex} />
          )}
          {candidateSide.cut > 0 && (
            <p className="pt-2 text-note text-ink-3">
              The path was longer than what is kept: {candidateSide.cut} lines were cut.
            </p>
          )}
        </div>
      </section>
      {candidateSide.hasPath && (
        <Entry title="Plots" note="Both are also in the table above.">
          <SolvePlots
            reference={referenceSide}
            candidate={candidateSide}
            suiteCase={suiteCase}
            attainable={attainable}
          />
        </Entry>
      )}
      <Entry title="Query check" note="What the path shows without being asked. Findings, not failures.">
        <ul className="finds">
          {findingRows(referenceSide, candidateSide, suiteCase).map((row) => (
            <li key={row.term}>
              <b className="font-medium">{row.term}</b>
              <span className={row.isQuiet ? 'text-table text-ink-3' : ''}>
                <RichText pieces={row.pieces} />
              </span>
            </li>
          ))}
        </ul>
      </Entry>
      <Entry
        title="At home"
        note="Runs this one case against a folder on your own machine and prints its path."
      >
        <HomeCommand command={command} />
        <p className="text-note text-ink-3">
          DIR is a checkout of {run.library}
          {run.build.commit === null ? (
            ''
          ) : (
            <>
              {' '}
              at <span className="num">{formatCommit(run.build.commit)}</span>
            </>
          )}
          , prepared so that it runs.{' '}
          {!props.isBuiltInSuite && (
            <>
              {run.suite.slug}.yaml is the text of{' '}
              <Link to={paths.suite(run.suite.slug, run.suite.revision)}>
                revision {run.suite.revision} of the suite
              </Link>
              .{' '}
            </>
          )}
          Both lines are typed in the folder of Tallyroot; the second prints the path.
        </p>
      </Entry>
    </Page>
  );
}

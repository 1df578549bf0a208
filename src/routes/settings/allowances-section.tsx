import { useQuery } from '@tanstack/react-query';
import { type FormEvent, useMemo, useState } from 'react';
import type { AllowanceRevisionView } from '../../../shared/schemas/allowance-revisions.ts';
import type { LibraryView } from '../../../shared/schemas/libraries.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { Button } from '../../components/ui/button.tsx';
import { FormAlert } from '../../components/ui/form-alert.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { TextAction } from '../../components/ui/text-action.tsx';
import { TextAreaField } from '../../components/ui/text-area-field.tsx';
import { AllowanceFields } from '../../features/allowances/allowance-fields.tsx';
import { allowanceRevisionsQuery, useSetAllowances } from '../../features/allowances/allowances.queries.ts';
import { draftOf, readDraft } from '../../features/allowances/draft.ts';
import { RevisionList } from '../../features/allowances/revision-list.tsx';
import { allowancesQuery, solversQuery } from '../../features/libraries/libraries.queries.ts';
import { useMay } from '../../features/session/use-may.ts';
import { allowanceLines, exceptionLines } from '../../lib/allowance-words.ts';
import { sentenceOf } from '../../lib/check-form.ts';
import { usePreviewPairs } from './use-preview-pairs.ts';
import { VerdictPreview } from './verdict-preview.tsx';

function AllowancesForm({ library, current }: { library: LibraryView; current: AllowanceRevisionView }) {
  const solvers = useQuery(solversQuery(library.slug));
  const preview = usePreviewPairs(library.slug);
  const set = useSetAllowances(library.slug);
  const [draft, setDraft] = useState(() => draftOf(current.allowances));
  const [reason, setReason] = useState('');
  const [hasNoReason, setHasNoReason] = useState(false);
  const read = useMemo(() => readDraft(draft), [draft]);
  const isChanged = JSON.stringify(read.set) !== JSON.stringify(current.allowances);
  function handleSubmit(event: FormEvent): void {
    event.preventDefault();
    setHasNoReason(reason.trim() === '');
    if (read.set === null || reason.trim() === '') return;
    set.mutate({ allowances: read.set, reason: reason.trim(), basedOn: current.number });
  }
  return (
    <form onSubmit={handleSubmit} noValidate>
      <Entry
        title="Limits"
        note={
          <>
            <p>A figure, or “no limit”. Exactly at a limit is within it.</p>
            <p>
              An exception holds instead; an empty field in it means as for all. A solver’s wins over a
              trait’s.
            </p>
          </>
        }
      >
        <AllowanceFields
          draft={draft}
          problems={read.problems ?? {}}
          solvers={(solvers.data ?? []).map((solver) => solver.name)}
          traits={preview.traits}
          onChange={setDraft}
        />
      </Entry>
      <Entry
        title="What they would say"
        note={`The newest builds${preview.suite === undefined ? '' : ` on ${preview.suite}`}, judged here, as you type. “Now” is by number ${current.number}.`}
      >
        <VerdictPreview preview={preview} now={current.allowances} proposed={read.set} />
      </Entry>
      <Entry
        title="Set them"
        note="They hold from then on, also for builds that were judged before. What held stays on record."
      >
        <div className="max-w-[46em]">
          <TextAreaField
            label="Why"
            value={reason}
            problem={
              hasNoReason && reason.trim() === ''
                ? 'A sentence that says why; whoever asks later reads it.'
                : null
            }
            onChange={(event) => setReason(event.target.value)}
          />
          <div className="flex flex-wrap items-center gap-x-4 gap-y-2 py-3">
            <Button type="submit" isMain disabled={set.isPending || read.set === null || !isChanged}>
              Set the allowances
            </Button>
            {isChanged && (
              <TextAction onClick={() => setDraft(draftOf(current.allowances))}>
                Back to what holds
              </TextAction>
            )}
            <span className="text-note text-ink-3">
              {read.set === null
                ? 'A field cannot be read.'
                : isChanged
                  ? ''
                  : 'These are the ones that hold.'}
            </span>
          </div>
          <FormAlert>{sentenceOf(set.error)}</FormAlert>
        </div>
      </Entry>
    </form>
  );
}

/** What the team tolerates: seen by all, set by maintainers. */
export function AllowancesSection({ library }: { library: LibraryView }) {
  const current = useQuery(allowancesQuery(library.slug));
  const revisions = useQuery(allowanceRevisionsQuery(library.slug));
  const may = useMay();
  return (
    <>
      {current.data === undefined ? (
        <Entry title="Limits">
          <QueryState<unknown> query={current} what="the allowances">
            {() => null}
          </QueryState>
        </Entry>
      ) : may('allowances.edit', library) ? (
        <AllowancesForm key={current.data.number} library={library} current={current.data} />
      ) : (
        <Entry title="Limits" note="Maintainers of the library set them.">
          <ul className="finds">
            {[
              ...allowanceLines(current.data.allowances.base),
              ...exceptionLines(current.data.allowances),
            ].map((line) => (
              <li key={line.term}>
                <b className="font-medium">{line.term}</b>
                <span>{line.text}</span>
              </li>
            ))}
          </ul>
        </Entry>
      )}
      <Entry title="What held before" note="Nothing is overwritten.">
        <QueryState
          query={revisions}
          what="the revisions"
          isEmpty={(list) => list.length === 0}
          empty={
            <StateNote title="The product’s own hold">
              The library has not set any; the first ones set here become number 1.
            </StateNote>
          }
        >
          {(list) => <RevisionList revisions={list} />}
        </QueryState>
      </Entry>
    </>
  );
}

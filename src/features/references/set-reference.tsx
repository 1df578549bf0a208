import { useState } from 'react';
import type { ReferenceRevisionView } from '../../../shared/schemas/references.ts';
import type { RunDetail } from '../../../shared/schemas/runs.ts';
import { Ask } from '../../components/ui/ask.tsx';
import { Field } from '../../components/ui/field.tsx';
import { formatCount } from '../../lib/format.ts';
import { useSetReference } from './references.queries.ts';

export interface SetReferenceProps {
  run: RunDetail;
  onDone: (revision: ReferenceRevisionView) => void;
  onClose: () => void;
}

/** Makes the results of a run the first that a library has agreed on, with a reason that stays with them. */
export function SetReference({ run, onDone, onClose }: SetReferenceProps) {
  const set = useSetReference(run.library);
  const [reason, setReason] = useState('');
  return (
    <Ask
      question={
        <>
          From now on every run of {run.library} on {run.suite.slug} is compared with these{' '}
          {formatCount(run.progress.stored, 'result')}. Later changes are agreed entry by entry; nothing is
          overwritten.
        </>
      }
      word="Make them the reference"
      onYes={() => set.mutate({ run: run.id, reason: reason.trim() }, { onSuccess: onDone })}
      onNo={onClose}
      isBusy={set.isPending}
      isPossible={reason.trim() !== ''}
      problem={set.error?.message ?? null}
    >
      <Field
        label="Why these are the results to agree on (kept with them)"
        value={reason}
        maxLength={2000}
        required
        onChange={(event) => setReason(event.target.value)}
      />
    </Ask>
  );
}

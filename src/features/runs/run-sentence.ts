import { isRightlyRefused, isSuccess } from '../../../shared/numerics/judge-claim.ts';
import type { RunView, SolveView } from '../../../shared/schemas/runs.ts';
import { type Outcome, outcomes } from '../../../shared/schemas/words.ts';
import type { TextPiece } from '../../components/ui/rich-text.tsx';
import { formatCount, formatFigure } from '../../lib/format.ts';

const figure = (text: string): TextPiece => ({ text, figure: true });
const strong = (text: string): TextPiece => ({ text, strong: true });
const plain = (text: string): TextPiece => ({ text });

/** What a failure is in a sentence, by its outcome. Gravest first: a false claim is worse than a refusal. */
const gravity: readonly Outcome[] = [
  'false claim',
  'crashed',
  'garbled',
  'other root',
  'timed out',
  'over budget',
  'refused',
];

function saying(outcome: Outcome): string {
  if (outcome === 'false claim') return 'claims a root that is none on ';
  if (outcome === 'other root') return 'finds a root that is not asked for on ';
  if (outcome === 'crashed') return 'crashes on ';
  if (outcome === 'garbled') return 'breaks off with a line that is none of the wire’s on ';
  if (outcome === 'timed out') return 'is not done in time on ';
  if (outcome === 'over budget') return 'spends all its evaluations on ';
  return 'gives up on ';
}

export interface OutcomeCounts {
  total: number;
  success: number;
  rightly: number;
  byOutcome: Map<Outcome, number>;
}

/** Counts over what was applicable; a right refusal is not counted among the refused. */
export function countOutcomes(solves: readonly SolveView[]): OutcomeCounts {
  const byOutcome = new Map<Outcome, number>();
  let rightly = 0;
  for (const solve of solves) {
    if (isRightlyRefused(solve)) rightly += 1;
    else byOutcome.set(solve.outcome, (byOutcome.get(solve.outcome) ?? 0) + 1);
  }
  const total = solves.length - (byOutcome.get('not applicable') ?? 0);
  return { total, success: (byOutcome.get('solved') ?? 0) + rightly, rightly, byOutcome };
}

function progressPieces(run: RunView, counts: OutcomeCounts): TextPiece[] {
  const { stored, planned } = run.progress;
  const parts = outcomes.flatMap((outcome) => {
    const count = counts.byOutcome.get(outcome) ?? 0;
    return count === 0 ? [] : [{ count, word: outcome as string }];
  });
  if (counts.rightly > 0) parts.splice(1, 0, { count: counts.rightly, word: 'rightly refused' });
  const list = parts.flatMap((part, index): TextPiece[] => [
    plain(index === 0 ? ': ' : ', '),
    figure(formatFigure(part.count)),
    plain(` ${part.word}`),
  ]);
  return [
    figure(`${formatFigure(stored)} of ${formatFigure(planned)}`),
    plain(' solves done'),
    ...list,
    plain('.'),
  ];
}

function resultPieces(run: RunView, solves: readonly SolveView[], counts: OutcomeCounts): TextPiece[] {
  const failed = solves
    .filter((solve) => !isSuccess(solve) && solve.outcome !== 'not applicable')
    .toSorted((a, b) => gravity.indexOf(a.outcome) - gravity.indexOf(b.outcome));
  const [worst, ...others] = failed;
  if (counts.total === 0)
    return [plain('No solver of this build takes what the suite gives; nothing was run.')];
  const evaluations = solves.reduce((sum, solve) => sum + solve.evaluations, 0);
  if (worst === undefined) {
    return [
      plain('All '),
      figure(formatFigure(counts.total)),
      plain(' solves are solved or rightly refused, in '),
      figure(formatFigure(evaluations)),
      plain(' evaluations.'),
    ];
  }
  const head = [strong(worst.solver), plain(` ${saying(worst.outcome)}`), strong(worst.case)];
  const rest: TextPiece[] =
    others.length === 0
      ? [plain('; all others are solved or rightly refused, ')]
      : [
          plain(', and '),
          figure(formatFigure(others.length)),
          plain(others.length === 1 ? ' more is not solved; ' : ' more are not solved; '),
        ];
  return [
    ...head,
    ...rest,
    figure(`${formatFigure(counts.success)} of ${formatFigure(counts.total)}`),
    plain(
      `${run.status === 'finished' ? '' : ' of those that were run'} ${counts.success === 1 ? 'is' : 'are'}.`,
    ),
  ];
}

/** The sentence at the head of a run. */
export function runSentence(run: RunView, solves: readonly SolveView[]): TextPiece[] {
  const counts = countOutcomes(solves);
  if (run.status === 'queued') {
    return [
      figure(formatCount(run.progress.planned, 'solve')),
      plain(' are planned; the run waits for its turn.'),
    ];
  }
  if (run.status === 'running' && run.phase === 'confirming') {
    const { toConfirm, confirmed } = run.progress;
    return [
      plain('All is measured. What differs is repeated in a fresh process: '),
      figure(`${formatFigure(confirmed)} of ${formatFigure(toConfirm)}`),
      plain(' done.'),
    ];
  }
  if (run.status === 'running') return progressPieces(run, counts);
  if (run.status === 'failed' && solves.length === 0) return [plain('The build could not be run.')];
  return resultPieces(run, solves, counts);
}

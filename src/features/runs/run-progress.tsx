import { isSuccess } from '../../../shared/numerics/judge-claim.ts';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { RunDetail, SolveView } from '../../../shared/schemas/runs.ts';
import { Tally, type TallyStroke } from '../../components/marks/tally.tsx';
import { formatFigure } from '../../lib/format.ts';
import { countPlanned } from './planned-solves.ts';

export interface RunProgressProps {
  run: RunDetail;
  solves: readonly SolveView[];
  cases: readonly SuiteCase[];
}

const mostStrokes = 120;

/** Strokes of one solver: in the order of solving, then the next one, then those that wait. */
export function tallyStrokes(
  solves: readonly SolveView[],
  planned: number,
  isRunning: boolean,
): TallyStroke[] {
  const done = solves.map((solve): TallyStroke => {
    return isSuccess(solve) || solve.outcome === 'not applicable' ? 'done' : 'failed';
  });
  const waiting = Math.max(0, planned - done.length);
  if (waiting === 0) return done;
  const rest = Array.from({ length: waiting }, (): TallyStroke => 'waiting');
  if (isRunning && done.length > 0) rest[0] = 'now';
  return [...done, ...rest];
}

/** Where a stroke must stand for several solves it is vermilion if one of them failed. */
export function thinOut(strokes: readonly TallyStroke[], each: number): TallyStroke[] {
  if (each <= 1) return [...strokes];
  return Array.from({ length: Math.ceil(strokes.length / each) }, (_, index) => {
    const part = strokes.slice(index * each, index * each + each);
    return (['failed', 'now', 'waiting', 'done'] as const).find((kind) => part.includes(kind)) ?? 'waiting';
  });
}

/** Five-bar tallies by solver: dotted waits, vermilion was not solved, the beating one is next. */
export function RunProgress({ run, solves, cases }: RunProgressProps) {
  const rows = run.solvers.map(({ declaration }) => {
    const own = solves.filter((solve) => solve.solver === declaration.name).toSorted((a, b) => a.id - b.id);
    const planned = Math.max(
      own.length,
      cases.reduce((sum, suiteCase) => sum + countPlanned(declaration, suiteCase), 0),
    );
    return { name: declaration.name, own, planned };
  });
  const each = Math.max(1, Math.ceil(Math.max(0, ...rows.map((row) => row.planned)) / mostStrokes));
  const isRunning = run.status === 'running' && run.phase === 'measuring';
  const { stored, planned } = run.progress;
  return (
    <div
      className="mt-4 flex flex-wrap gap-x-8.5 gap-y-3.5"
      role="progressbar"
      aria-valuemin={0}
      aria-valuemax={planned}
      aria-valuenow={stored}
      aria-label="Solves done"
      aria-valuetext={`${stored} of ${planned}`}
    >
      {rows.map((row) => (
        <div key={row.name} className="grid gap-1">
          <span className="text-[12.5px]">
            <b className="font-medium">{row.name}</b>{' '}
            <span className="text-ink-3">
              <span className="num">{formatFigure(row.own.length)}</span> of{' '}
              <span className="num">{formatFigure(row.planned)}</span>
            </span>
          </span>
          <Tally strokes={thinOut(tallyStrokes(row.own, row.planned, isRunning), each)} />
        </div>
      ))}
      {each > 1 && <p className="w-full text-note text-ink-3">A stroke is {each} solves.</p>}
    </div>
  );
}

import { useQuery } from '@tanstack/react-query';
import { shareAt } from '../../../shared/numerics/profiles.ts';
import type { PairView } from '../../../shared/schemas/comparisons.ts';
import type { ProfileView } from '../../../shared/schemas/profiles.ts';
import type { RunBase } from '../../../shared/schemas/runs.ts';
import { EqualityPlot } from '../../components/charts/equality-plot.tsx';
import { StepPlot } from '../../components/charts/step-plot.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { formatCount, formatFigure } from '../../lib/format.ts';
import { profileQuery } from './comparisons.queries.ts';
import { comparablePairs, costDots, countSides } from './cost-dots.ts';

export interface CostPlotsProps {
  candidate: number;
  base: RunBase;
  pairs: readonly PairView[];
  /** One solver, or an empty text for all of them. */
  solver: string;
}

const sideNames = ['reference', 'candidate'] as const;
const factors = [1, 1.25, 1.5, 2, 4];
const percent = (share: number): string => `${Math.round(share * 1000) / 10}`;

function Evaluations({ pairs }: { pairs: readonly PairView[] }) {
  if (pairs.length === 0) {
    return <StateNote title="Nothing to draw">No pair was solved by both builds.</StateNote>;
  }
  const { above, on, below } = countSides(pairs);
  const said = `${formatFigure(above)} above the line, dearer; ${formatFigure(on)} on it; ${formatFigure(below)} below it, cheaper.`;
  return (
    <figure className="min-w-0">
      <h3 className="pb-1.5 text-table font-medium">Evaluations, pair by pair</h3>
      <EqualityPlot
        dots={costDots(pairs)}
        xName="reference"
        yName="candidate"
        label={`Evaluations of ${formatCount(pairs.length, 'pair')}, reference against candidate: ${said} The table of pairs has every one.`}
      />
      <figcaption className="max-w-[52ch] pt-1.5 text-note text-ink-3">
        {formatCount(pairs.length, 'pair')} that both solved: {said} Larger dots are several pairs.
      </figcaption>
    </figure>
  );
}

function ProfileTable({ profile }: { profile: ProfileView }) {
  return (
    <table className="table mt-2 max-w-[560px]">
      <caption className="pb-1 text-left text-note text-ink-3">
        The same in figures: % of {formatCount(profile.problems, 'pair')} solved with at most τ times the
        evaluations of the cheaper build
      </caption>
      <thead>
        <tr>
          <th scope="col">τ</th>
          {factors.map((factor) => (
            <th key={factor} scope="col" className="r">
              {factor}
            </th>
          ))}
          <th scope="col" className="r">
            any
          </th>
        </tr>
      </thead>
      <tbody>
        {profile.profiles.map((one, index) => (
          <tr key={one.name}>
            <th scope="row" className={index === 0 ? 'text-ref!' : ''}>
              {sideNames[index]}
            </th>
            {factors.map((factor) => (
              <td key={factor} className="fig r">
                {percent(shareAt(one, factor))}
              </td>
            ))}
            <td className="fig r">{percent(one.solved)}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function Profile({ profile }: { profile: ProfileView }) {
  if (profile.problems === 0) {
    return <StateNote title="No profile">There is no pair that both builds were run on.</StateNote>;
  }
  const lines = profile.profiles.map((one, index) => ({
    name: sideNames[index] ?? one.name,
    isReference: index === 0,
    points: one.points,
  }));
  return (
    <figure className="min-w-0">
      <h3 className="pb-1.5 text-table font-medium">Performance profile</h3>
      <StepPlot
        lines={lines}
        xName="τ, times the evaluations of the cheaper"
        yName="share of the pairs"
        label="Performance profiles of both builds; the table below has their values."
      />
      <figcaption>
        <ProfileTable profile={profile} />
        {profile.leftOut > 0 && (
          <p className="pt-1.5 text-note text-ink-3">
            {formatCount(profile.leftOut, 'pair')} left out: not run by both, or answered without an
            evaluation.
          </p>
        )}
      </figcaption>
    </figure>
  );
}

/** The totals as pictures: cost pair by pair, and over all pairs as performance profiles. */
export function CostPlots({ candidate, base, pairs, solver }: CostPlotsProps) {
  const profile = useQuery(profileQuery(candidate, base, solver));
  return (
    <div className="grid grid-cols-1 gap-x-9 gap-y-6.5 beside:grid-cols-[minmax(0,440px)_minmax(0,560px)]">
      <Evaluations pairs={comparablePairs(pairs, solver)} />
      <div className="min-w-0">
        <QueryState query={profile} what="the profile">
          {(data) => <Profile profile={data} />}
        </QueryState>
      </div>
    </div>
  );
}

import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router';
import { Entry } from '../../components/sheet/entry.tsx';
import { Facts } from '../../components/sheet/facts.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { runsQuery } from '../../features/runs/runs.queries.ts';
import { aboutQuery } from '../../features/session/session.queries.ts';
import { formatCommit } from '../../lib/format.ts';
import { paths } from '../../paths.ts';

function InHand() {
  const running = useQuery(runsQuery({ status: 'running' }));
  const queued = useQuery(runsQuery({ status: 'queued' }));
  const first = running.data === undefined ? running : queued;
  if (running.data === undefined || queued.data === undefined)
    return (
      <QueryState<unknown> query={first} what="the runs in hand">
        {() => null}
      </QueryState>
    );
  const runs = [...running.data, ...queued.data.toReversed()];
  if (runs.length === 0)
    return <StateNote title="The lanes stand still">No run is in progress, and none waits.</StateNote>;
  return (
    <table className="table stack">
      <thead>
        <tr>
          <th scope="col">run</th>
          <th scope="col">library and build</th>
          <th scope="col">suite</th>
          <th scope="col" className="r">
            lanes
          </th>
          <th scope="col">how far</th>
        </tr>
      </thead>
      <tbody>
        {runs.map((run) => (
          <tr key={run.id}>
            <th scope="row">
              <Link to={paths.run(run.id)}>Run {run.id}</Link>
            </th>
            <td>
              {run.library} <span className="num">{formatCommit(run.build.commit ?? run.build.label)}</span>
            </td>
            <td>{run.suite.slug}</td>
            <td className="fig r max-wide:text-left" data-label="lanes">
              {run.settings.lanes}
            </td>
            <td>
              {run.status === 'queued'
                ? 'waits for its turn'
                : `${run.phase}, ${run.progress.stored} of ${run.progress.planned} solves`}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** Where and with what this server measures, and what it measures now. */
export function LanesSection() {
  const about = useQuery(aboutQuery);
  return (
    <>
      <Entry
        title="Measured with"
        note="Runs with different fingerprints of the arithmetic are not compared as exact. How many lanes there are is set where the server starts (LANES)."
      >
        <QueryState query={about} what="what this server measures with">
          {({ environment }) =>
            environment === null ? (
              <StateNote title="Not told">Sign in to see it.</StateNote>
            ) : (
              <Facts
                facts={[
                  { term: 'machine', value: `${environment.platform}, ${environment.arch}` },
                  { term: 'Node', value: environment.node },
                  { term: 'V8', value: environment.v8 },
                  { term: 'Tallyroot', value: environment.tallyroot },
                  {
                    term: 'adapters run',
                    value:
                      environment.confinement === 'sandboxed' ? 'in a sandbox' : 'unconfined, as this user',
                  },
                  {
                    term: 'fingerprint',
                    value: <span className="num">{environment.fingerprint.slice(0, 16)}…</span>,
                    isLong: true,
                  },
                ]}
              />
            )
          }
        </QueryState>
      </Entry>
      <Entry
        title="In hand"
        note="One run at a time has the lanes; the others wait in the order in which they came."
      >
        <InHand />
      </Entry>
    </>
  );
}

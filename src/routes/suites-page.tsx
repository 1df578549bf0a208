import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router';
import { Entry } from '../components/sheet/entry.tsx';
import { Page } from '../components/sheet/page.tsx';
import { VerdictBlock } from '../components/sheet/verdict-block.tsx';
import { QueryState } from '../components/ui/query-state.tsx';
import { StateNote } from '../components/ui/state-note.tsx';
import { suitesQuery } from '../features/suites/suites.queries.ts';
import { formatCount, formatFigure, formatShortDate } from '../lib/format.ts';
import { moveRowFocus } from '../lib/row-focus.ts';
import { useKeys } from '../lib/use-keys.ts';
import { paths } from '../paths.ts';

/** Every suite with its newest revision. */
export function SuitesPage() {
  const query = useQuery(suitesQuery);
  useKeys({ j: () => moveRowFocus(1), k: () => moveRowFocus(-1) });
  const cases = query.data?.reduce((sum, suite) => sum + suite.caseCount, 0) ?? 0;
  return (
    <Page
      title="Suites"
      trail={[{ label: 'Suites' }]}
      keys={[
        { keys: ['j', 'k'], does: 'next, previous suite' },
        { keys: ['enter'], does: 'open it' },
      ]}
    >
      {query.data !== undefined && (
        <VerdictBlock
          sign="Suites"
          colour="text-ink"
          sentence={`${formatCount(query.data.length, 'suite')} with ${formatCount(cases, 'case')} in all, every root of them certified.`}
        />
      )}
      <Entry title="Suites" note="Each saved change is a new revision; none of them is ever overwritten.">
        <QueryState
          query={query}
          what="the suites"
          isEmpty={(list) => list.length === 0}
          empty={
            <StateNote title="No suite yet">The built-in suites are read when the server starts.</StateNote>
          }
        >
          {(list) => (
            <table className="table table-rows stack">
              <thead>
                <tr>
                  <th scope="col">suite</th>
                  <th scope="col">what it is</th>
                  <th scope="col" className="r">
                    cases
                  </th>
                  <th scope="col" className="r">
                    revision
                  </th>
                  <th scope="col">where from</th>
                  <th scope="col">changed</th>
                </tr>
              </thead>
              <tbody>
                {list.map((suite) => (
                  <tr key={suite.slug}>
                    <th scope="row" className="lead-cell">
                      <Link to={paths.suite(suite.slug)} data-row-link>
                        {suite.slug}
                      </Link>
                    </th>
                    <td>{suite.title}</td>
                    <td className="fig r max-wide:text-left" data-label="cases">
                      {formatFigure(suite.caseCount)}
                    </td>
                    <td className="fig r max-wide:text-left" data-label="revision">
                      {formatFigure(suite.revision)}
                    </td>
                    <td className="text-ink-2">{suite.builtIn ? 'built in' : 'uploaded'}</td>
                    <td className="text-ink-2">{formatShortDate(suite.updatedAt)}</td>
                  </tr>
                ))}
              </tbody>
            </table>
          )}
        </QueryState>
      </Entry>
    </Page>
  );
}

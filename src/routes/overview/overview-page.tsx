import { Link } from 'react-router';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { ButtonLink } from '../../components/ui/button.tsx';
import { LoadingStrokes } from '../../components/ui/loading-strokes.tsx';
import { RichText } from '../../components/ui/rich-text.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { useMay } from '../../features/session/use-may.ts';
import { formatCommit, formatCount, formatDateTime, formatFigure } from '../../lib/format.ts';
import { moveRowFocus } from '../../lib/row-focus.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { paths } from '../../paths.ts';
import { overviewPieces } from './overview-sentence.ts';
import { type Overview, useOverview } from './use-overview.ts';
import { VerdictRows } from './verdict-rows.tsx';

function RunsInProgress({ running }: Pick<Overview, 'running'>) {
  if (running.length === 0) return null;
  return (
    <Entry title="In progress" note="A run is one build on one suite.">
      <ul className="finds">
        {running.map((run) => (
          <li key={run.id}>
            <b className="font-medium">
              <Link to={paths.run(run.id)} data-row-link>
                Run {run.id}
              </Link>
            </b>
            <span>
              {run.library} <span className="num">{formatCommit(run.build.commit ?? run.build.label)}</span>{' '}
              on {run.suite.slug}:{' '}
              {run.status === 'queued'
                ? 'waits for its turn'
                : `${run.progress.stored} of ${run.progress.planned} solves done`}
            </span>
          </li>
        ))}
      </ul>
    </Entry>
  );
}

function Failures({ failedBuilds, failedRuns }: Pick<Overview, 'failedBuilds' | 'failedRuns'>) {
  if (failedBuilds.length + failedRuns.length === 0) return null;
  return (
    <Entry title="Failed" note="Builds that could not be prepared, and runs that did not come to their end.">
      <ul className="finds">
        {failedBuilds.map((build) => (
          <li key={`build ${build.id}`}>
            <b className="font-medium">
              <Link to={paths.build(build.id)} data-row-link>
                Build {formatCommit(build.commit ?? build.label)}
              </Link>
            </b>
            <span>
              {build.library}, {build.label}: {build.reason ?? 'it could not be prepared.'}
            </span>
          </li>
        ))}
        {failedRuns.map((run) => (
          <li key={`run ${run.id}`}>
            <b className="font-medium">
              <Link to={paths.run(run.id)} data-row-link>
                Run {run.id}
              </Link>
            </b>
            <span>
              {run.library} on {run.suite.slug}, {formatDateTime(run.createdAt)}:{' '}
              {run.reason ?? 'it did not come to its end.'}
            </span>
          </li>
        ))}
      </ul>
    </Entry>
  );
}

function WithoutReference({ withoutReference }: Pick<Overview, 'withoutReference'>) {
  const may = useMay();
  if (withoutReference.length === 0) return null;
  return (
    <Entry
      title="Without a reference"
      note="Until results are agreed on, a build can only be compared with another build."
    >
      <ul className="finds">
        {withoutReference.map(({ library, suite, run }) => (
          <li key={`${library.slug} ${suite}`}>
            <b className="font-medium">{suite}</b>
            <span>
              {library.name}: its newest finished run there is{' '}
              <Link to={paths.run(run.id)} data-row-link>
                run {run.id}
              </Link>
              .{' '}
              {may('reference.accept', library)
                ? 'You can make its results the first reference there.'
                : 'A reviewer or maintainer can make its results the first reference.'}
            </span>
          </li>
        ))}
      </ul>
    </Entry>
  );
}

function Empty() {
  return (
    <Entry title="Begin" note="A library is a set of solvers that are built and run together.">
      <StateNote
        title="No library yet"
        actions={
          <>
            <ButtonLink to={paths.newLibrary()} isMain>
              Create a library
            </ButtonLink>
            <Link to={paths.guideChapter('adapter')}>How to write an adapter</Link>
          </>
        }
      >
        Create one, register a build of it, and run that on a suite. Or ask a maintainer of an existing
        library for an invitation; it comes by mail.
      </StateNote>
    </Entry>
  );
}

/** What waits for the one who looks. */
export function OverviewPage() {
  const overview = useOverview();
  const { libraries, judged, isReading } = overview;
  useKeys({ j: () => moveRowFocus(1), k: () => moveRowFocus(-1) });
  const notWithin = judged.filter(
    ({ comparison }) => comparison !== undefined && comparison.verdict !== 'within allowances',
  );
  const beyond = notWithin.flatMap(({ build, comparison }) =>
    comparison?.verdict === 'beyond allowances'
      ? [{ what: build.subject ?? build.label, broke: comparison.changes.broke ?? 0 }]
      : [],
  );
  const within = judged.filter(({ comparison }) => comparison?.verdict === 'within allowances');
  const isEmpty = !isReading && libraries.length === 0;
  return (
    <Page
      title="Overview"
      trail={[{ label: 'Overview' }]}
      keys={[
        { keys: ['j', 'k'], does: 'next, previous' },
        { keys: ['enter'], does: 'open it' },
      ]}
    >
      {isReading ? (
        <Entry title="Overview">
          <LoadingStrokes label="Reading what waits for you" />
        </Entry>
      ) : (
        <VerdictBlock
          sign="Overview"
          colour="text-ink"
          note={
            !overview.isMember && libraries.length > 0 ? (
              <p>You are a member of no library; this is about all that you may see.</p>
            ) : undefined
          }
          sentence={
            <RichText
              pieces={overviewPieces({
                libraries: libraries.length,
                beyond,
                failed: overview.failedBuilds.length + overview.failedRuns.length,
                running: overview.running.length,
                withoutReference: overview.withoutReference.length,
              })}
            />
          }
          lead={
            judged.length > 0
              ? `The newest ${formatCount(judged.length, 'build')} of ${formatCount(libraries.length, 'library', 'libraries')} were looked at: ${formatFigure(within.length)} within allowances.`
              : undefined
          }
        />
      )}
      {overview.errors > 0 && (
        <Entry title="Not read">
          <StateNote isProblem title="Not everything could be read">
            {formatCount(overview.errors, 'list')} did not come; what is shown is the rest.
          </StateNote>
        </Entry>
      )}
      {isEmpty && <Empty />}
      <RunsInProgress running={overview.running} />
      {notWithin.length > 0 && (
        <Entry
          title="Beyond allowances"
          note="Of the newest builds of each library, on the suite that it is run on most; against the reference, or else the build before."
        >
          <VerdictRows judged={notWithin} />
        </Entry>
      )}
      {within.length > 0 && (
        <Entry title="Within allowances">
          <VerdictRows judged={within} />
        </Entry>
      )}
      <Failures failedBuilds={overview.failedBuilds} failedRuns={overview.failedRuns} />
      <WithoutReference withoutReference={overview.withoutReference} />
      {!isReading && libraries.length > 0 && judged.length === 0 && overview.running.length === 0 && (
        <Entry title="Next">
          <StateNote title="Nothing has been compared yet">
            Register a build of{' '}
            {libraries.slice(0, 3).map((library, index) => (
              <span key={library.slug}>
                {index > 0 && ', '}
                <Link to={paths.library(library.slug)}>{library.name}</Link>
              </span>
            ))}{' '}
            and run it on a suite; from the second one on, each is compared with what was before.
          </StateNote>
        </Entry>
      )}
    </Page>
  );
}

import { useQuery } from '@tanstack/react-query';
import { Link, useNavigate } from 'react-router';
import { gravity } from '../../../shared/comparison/change.ts';
import type { AllowanceRevisionView } from '../../../shared/schemas/allowance-revisions.ts';
import type { BuildView } from '../../../shared/schemas/builds.ts';
import type { LibraryView, SolverView } from '../../../shared/schemas/libraries.ts';
import type { RunBase, RunView } from '../../../shared/schemas/runs.ts';
import { ChangeWord } from '../../components/marks/change-word.tsx';
import { VerdictSign, verdictColour } from '../../components/marks/verdict-sign.tsx';
import { Entry } from '../../components/sheet/entry.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { Button, ButtonLink } from '../../components/ui/button.tsx';
import { FilterWord } from '../../components/ui/filter-word.tsx';
import { RichText } from '../../components/ui/rich-text.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { BuildsTable } from '../../features/builds/builds-table.tsx';
import { comparisonQuery } from '../../features/comparisons/comparisons.queries.ts';
import { roleIn } from '../../features/session/asker.ts';
import { useMay, usePerson } from '../../features/session/use-may.ts';
import { allowanceLines, exceptionLines } from '../../lib/allowance-words.ts';
import { formatCommit, formatDate } from '../../lib/format.ts';
import { moveRowFocus } from '../../lib/row-focus.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { useViewState } from '../../lib/use-view-state.ts';
import { paths } from '../../paths.ts';
import { ChangesCell, SolvedCell, VerdictCell } from './comparison-cells.tsx';
import { libraryPieces } from './library-sentence.ts';
import { newestRuns, suitesByUse } from './newest-runs.ts';
import { SolverTrends } from './solver-trends.tsx';

export interface LibrarySheetProps {
  library: LibraryView;
  builds: BuildView[];
  runs: RunView[];
  solvers: SolverView[];
  allowances: AllowanceRevisionView;
}

const shownBuilds = 8;

function focusedBuild(): number | null {
  const { activeElement } = document;
  return activeElement instanceof HTMLElement ? Number(activeElement.dataset.build) || null : null;
}

/** A library: how it stands, its solvers over the builds, its builds, its allowances. */
export function LibrarySheet({ library, builds, runs, solvers, allowances }: LibrarySheetProps) {
  const view = useViewState();
  const navigate = useNavigate();
  const may = useMay();
  const role = roleIn(usePerson(), library.slug);
  const canRegister = may('build.register', library);
  const suites = suitesByUse(runs);
  const suite = view.get('suite') || suites[0] || '';
  const runOf = newestRuns(runs, suite);
  const withRun = builds.filter((build) => runOf.has(build.id));
  const shown = withRun
    .slice(0, shownBuilds)
    .toReversed()
    .flatMap((build) => {
      const run = runOf.get(build.id);
      return run === undefined ? [] : [{ build, run }];
    });
  const idOf = (build: BuildView | undefined): number | null =>
    build === undefined ? null : (runOf.get(build.id)?.id ?? null);
  // A branch ran against the reference; what has no base of its own stands against the build before.
  const baseOf = (build: BuildView): RunBase | null => {
    const own = runOf.get(build.id)?.against ?? null;
    const before = withRun.includes(build) ? idOf(withRun[withRun.indexOf(build) + 1]) : null;
    return own ?? (before === null ? null : { kind: 'run', run: before });
  };
  const [newest] = withRun;
  const newestRun = idOf(newest);
  const newestBase = newest === undefined ? null : baseOf(newest);
  const comparison = useQuery({
    ...comparisonQuery(newestRun ?? 0, newestBase ?? { kind: 'run', run: 0 }),
    enabled: newestRun !== null && newestBase !== null,
  });
  const chosen = view
    .list('chosen')
    .map(Number)
    .filter((id) => builds.some((build) => build.id === id));
  const toggle = (id: number): void => {
    view.change('chosen', (words) => {
      const word = String(id);
      return words.includes(word) ? words.filter((other) => other !== word) : [...words, word].slice(-2);
    });
  };
  const pair = builds.filter((build) => chosen.includes(build.id));
  const [candidate, reference] = [idOf(pair[0]), idOf(pair[1])];
  const canCompare = candidate !== null && reference !== null;
  const compare = (): void => {
    if (canCompare) void navigate(paths.comparison(candidate, `run:${reference}`));
  };
  useKeys({
    j: () => moveRowFocus(1),
    k: () => moveRowFocus(-1),
    ' ': () => {
      const id = focusedBuild();
      if (id !== null) toggle(id);
    },
    m: compare,
    ...(canRegister ? { r: () => void navigate(paths.registerBuild(library.slug)) } : {}),
  });
  const lines = [...allowanceLines(allowances.allowances.base), ...exceptionLines(allowances.allowances)];
  const stand = comparison.data;
  const { overall } = stand ?? {};
  return (
    <Page
      title={library.name}
      trail={[{ label: 'Libraries', to: paths.libraries() }, { label: library.name }]}
      keys={[
        { keys: ['j', 'k'], does: 'next, previous build' },
        { keys: ['enter'], does: 'open the build' },
        { keys: ['space'], does: 'choose for a comparison' },
        { keys: ['m'], does: 'compare the two chosen' },
        ...(canRegister ? [{ keys: ['r'], does: 'register a build' }] : []),
      ]}
    >
      <VerdictBlock
        sign={
          stand === undefined ? (
            library.name
          ) : (
            <>
              <VerdictSign verdict={stand.verdict} isPlain /> {stand.verdict}
            </>
          )
        }
        colour={stand === undefined ? 'text-ink' : verdictColour[stand.verdict]}
        note={
          <>
            {library.homepage !== null && (
              <p>
                Source: <a href={library.homepage}>{library.homepage.replace(/^https?:\/\//, '')}</a>
              </p>
            )}
            {library.description !== '' && <p>{library.description}</p>}
            <p>
              {role === null
                ? 'You are no member; members register builds and run them.'
                : `You are ${role} here.`}
            </p>
          </>
        }
        sentence={
          <RichText
            pieces={libraryPieces({
              buildCount: builds.length,
              newest: newest === undefined ? null : formatCommit(newest.commit ?? newest.label),
              suite,
              comparison: newestBase === null ? null : stand,
              solved: overall?.candidate.solved ?? null,
              of: overall?.candidate.of ?? null,
            })}
          />
        }
        lead={
          newest === undefined ? undefined : (
            <>
              {newest.label}.{' '}
              {stand !== undefined && (
                <span className="inline-flex flex-wrap gap-x-4">
                  {gravity
                    .filter((change) => change !== 'same' && stand.changes[change] !== undefined)
                    .map((change) => (
                      <ChangeWord key={change} change={change} count={stand.changes[change] ?? 0} />
                    ))}
                </span>
              )}
            </>
          )
        }
        actions={
          <>
            {canRegister && (
              <ButtonLink isMain={builds.length === 0} hotkey="r" to={paths.registerBuild(library.slug)}>
                Register a build
              </ButtonLink>
            )}
            {builds.length > 1 && (
              <>
                <Button isMain={canCompare} hotkey="m" disabled={!canCompare} onClick={compare}>
                  Compare two builds
                </Button>
                {!canCompare && (
                  <span className="text-note text-ink-3">
                    {pair.length < 2
                      ? 'Choose two in the list below.'
                      : `Both must have a finished run on ${suite}.`}
                  </span>
                )}
              </>
            )}
            {may('members.read', library) && <Link to={paths.librarySettings(library.slug)}>Settings</Link>}
          </>
        }
      >
        {suites.length > 1 && (
          <div className="no-print mt-3 flex flex-wrap items-center gap-x-3.5">
            <span className="text-note text-ink-3">suite</span>
            {suites.map((name) => (
              <FilterWord
                key={name}
                word={name}
                isPressed={name === suite}
                onPress={() => view.set({ suite: name === suites[0] ? '' : name })}
              />
            ))}
          </div>
        )}
      </VerdictBlock>
      {builds.length > 0 && <SolverTrends shown={shown} solvers={solvers} suite={suite} />}
      <Entry
        title="Builds"
        note="Newest first, each against what it was run against: the reference results, or the build before. Choose two to compare them."
      >
        {builds.length === 0 ? (
          <StateNote title="No build yet">
            Register one from a repository, an archive or a folder of this machine. Tallyroot reads its{' '}
            <code>tallyroot.yaml</code> and shows what it will run before it runs.
          </StateNote>
        ) : (
          <BuildsTable
            builds={builds}
            buildHref={(build) => paths.build(build.id)}
            chosen={chosen}
            onChoose={(build) => toggle(build.id)}
            renderSolved={(build) => (
              <SolvedCell
                run={idOf(build)}
                base={baseOf(build)}
                solved={runOf.get(build.id)?.progress.solved ?? null}
              />
            )}
            renderChanges={(build) => <ChangesCell run={idOf(build)} base={baseOf(build)} />}
            renderVerdict={(build) => <VerdictCell run={idOf(build)} base={baseOf(build)} />}
          />
        )}
      </Entry>
      <Entry
        title="Allowances"
        note={
          allowances.createdAt === null ? (
            <p>The product’s own, until the library sets its own.</p>
          ) : (
            <p>
              Revision {allowances.number}, by {allowances.createdBy}, {formatDate(allowances.createdAt)}: “
              {allowances.reason}”
            </p>
          )
        }
      >
        <ul className="finds">
          {lines.map((line) => (
            <li key={line.term}>
              <b className="font-medium">{line.term}</b>
              <span>{line.text}</span>
            </li>
          ))}
        </ul>
      </Entry>
    </Page>
  );
}

import { useQuery } from '@tanstack/react-query';
import { useRef } from 'react';
import { useNavigate, useParams } from 'react-router';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { SuiteRevisionSummary, SuiteRevisionView } from '../../../shared/schemas/suites.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { Facts } from '../../components/sheet/facts.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { Button } from '../../components/ui/button.tsx';
import { Field } from '../../components/ui/field.tsx';
import { FilterWord } from '../../components/ui/filter-word.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { CasesTable } from '../../features/suites/cases-table.tsx';
import { suiteQuery, suiteRevisionQuery, suiteRevisionsQuery } from '../../features/suites/suites.queries.ts';
import { formatCount, formatDate, formatFigure } from '../../lib/format.ts';
import { moveRowFocus } from '../../lib/row-focus.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { useViewState } from '../../lib/use-view-state.ts';
import { paths } from '../../paths.ts';

function filterCases(cases: readonly SuiteCase[], text: string, trait: string): SuiteCase[] {
  const words = text.toLowerCase().split(/\s+/).filter(Boolean);
  return cases.filter((suiteCase) => {
    const haystack = [suiteCase.id, suiteCase.equation, ...suiteCase.traits].join(' ').toLowerCase();
    return (
      (trait === '' || suiteCase.traits.includes(trait)) && words.every((word) => haystack.includes(word))
    );
  });
}

function sentence(suite: SuiteRevisionView): string {
  const none = suite.cases.filter((suiteCase) => suiteCase.expectation === 'none').length;
  const certified = suite.cases.filter((suiteCase) => suiteCase.roots.length > 0).length;
  const parts = [
    `${formatCount(suite.cases.length, 'case')}: ${formatFigure(certified)} with a certified root`,
  ];
  if (none > 0) parts.push(`${formatFigure(none)} without a root, where refusing is right`);
  return `${suite.title}. ${parts.join(', ')}.`;
}

function SuiteSheet({ suite, revisions }: { suite: SuiteRevisionView; revisions: SuiteRevisionSummary[] }) {
  const view = useViewState();
  const navigate = useNavigate();
  const textField = useRef<HTMLInputElement>(null);
  const [text, trait] = [view.get('text'), view.get('trait')];
  const left = filterCases(suite.cases, text, trait);
  const traits = [...new Set(suite.cases.flatMap((suiteCase) => suiteCase.traits))];
  const clear = (): void => view.clear('text', 'trait');
  useKeys({
    j: () => moveRowFocus(1),
    k: () => moveRowFocus(-1),
    f: () => textField.current?.focus(),
    x: clear,
    escape: () => void navigate(paths.suites()),
  });
  return (
    <Page
      title={suite.suite}
      trail={[{ label: 'Suites', to: paths.suites() }, { label: suite.suite }]}
      keys={[
        { keys: ['j', 'k'], does: 'next, previous case' },
        { keys: ['enter'], does: 'open the case' },
        { keys: ['f'], does: 'narrow' },
        { keys: ['x'], does: 'clear the filter' },
        { keys: ['esc'], does: 'back to the suites' },
      ]}
    >
      <VerdictBlock
        sign={`revision ${suite.number}`}
        note={
          <p>
            {formatDate(suite.createdAt)}, by {suite.createdBy}.
          </p>
        }
        sentence={sentence(suite)}
        lead={suite.note === '' ? undefined : suite.note}
      >
        <Facts
          facts={[
            {
              term: 'limits of a solve',
              value: (
                <>
                  <span className="num">{formatFigure(suite.limits.evaluations)}</span> evaluations,{' '}
                  <span className="num">{suite.limits.seconds}</span> s
                </>
              ),
            },
            { term: 'hash', value: <span className="num">{suite.hash.slice(0, 16)}</span> },
          ]}
        />
      </VerdictBlock>
      {revisions.length > 1 && (
        <Entry title="Revisions">
          <ul className="finds">
            {revisions.map((revision) => (
              <li key={revision.number}>
                <FilterWord
                  word={`revision ${revision.number}`}
                  isPressed={revision.number === suite.number}
                  onPress={() => view.set({ revision: String(revision.number) })}
                />
                <span>
                  {formatDate(revision.createdAt)}, {revision.createdBy}
                  {revision.note === '' ? '' : `: ${revision.note}`}
                </span>
              </li>
            ))}
          </ul>
        </Entry>
      )}
      <Entry
        title="Cases"
        note={
          left.length < suite.cases.length
            ? `${left.length} of ${suite.cases.length} match.`
            : 'In the suite’s order.'
        }
      >
        <div className="no-print grid gap-y-1.5 pb-3">
          <Field
            ref={textField}
            label="Narrow by case, equation or trait"
            isLabelHidden
            type="search"
            className="w-[280px] max-wide:w-full"
            placeholder="case, equation or trait: e.g. pole"
            value={text}
            onChange={(event) => view.set({ text: event.target.value })}
          />
          <div className="flex flex-wrap items-center gap-x-3.5 gap-y-0.5">
            {traits.map((name) => (
              <FilterWord
                key={name}
                word={name}
                colour="text-ink-2"
                isPressed={trait === name}
                onPress={() => view.set({ trait: trait === name ? '' : name })}
              />
            ))}
          </div>
        </div>
      </Entry>
      <section className="ledger" aria-label="Table of cases">
        <div className="max-wide:hidden" />
        <div className="min-w-0">
          {left.length === 0 ? (
            <StateNote
              title="No case matches"
              actions={
                <Button hotkey="x" onClick={clear}>
                  Clear the filter
                </Button>
              }
            >
              No case has these words and this trait together.
            </StateNote>
          ) : (
            <CasesTable
              cases={left}
              caseHref={(suiteCase) => paths.suiteCase(suite.suite, suiteCase.id, suite.number)}
              onTrait={(name) => view.set({ trait: name })}
            />
          )}
        </div>
      </section>
    </Page>
  );
}

/** A suite at one revision: the newest, or the one that the address names. */
export function SuitePage() {
  const slug = useParams().suite ?? '';
  const asked = Number(useViewState().get('revision')) || null;
  const suite = useQuery({ ...suiteQuery(slug), enabled: asked === null });
  const number = asked ?? suite.data?.revision ?? null;
  const revision = useQuery({ ...suiteRevisionQuery(slug, number ?? 0), enabled: number !== null });
  const revisions = useQuery(suiteRevisionsQuery(slug));
  if (revision.data) return <SuiteSheet suite={revision.data} revisions={revisions.data ?? []} />;
  const shown = asked === null && suite.data === undefined ? suite : revision;
  return (
    <Page title={slug} trail={[{ label: 'Suites', to: paths.suites() }, { label: slug }]}>
      <Entry title="Suite">
        <QueryState<unknown> query={shown} what="the suite">
          {() => null}
        </QueryState>
      </Entry>
    </Page>
  );
}

import { useQuery } from '@tanstack/react-query';
import { lazy, Suspense } from 'react';
import { useNavigate, useParams } from 'react-router';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { SuiteRevisionView } from '../../../shared/schemas/suites.ts';
import { Entry } from '../../components/sheet/entry.tsx';
import { type Fact, Facts } from '../../components/sheet/facts.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { LoadingStrokes } from '../../components/ui/loading-strokes.tsx';
import { QueryState } from '../../components/ui/query-state.tsx';
import { StateNote } from '../../components/ui/state-note.tsx';
import { RootList } from '../../features/suites/root-list.tsx';
import { suiteQuery, suiteRevisionQuery } from '../../features/suites/suites.queries.ts';
import { formatDecimalText } from '../../lib/format.ts';
import { formatEquation } from '../../lib/format-equation.ts';
import { useKeys } from '../../lib/use-keys.ts';
import { useViewState } from '../../lib/use-view-state.ts';
import { paths } from '../../paths.ts';

const CurvePlot = lazy(async () => ({
  default: (await import('../../components/charts/curve-plot.tsx')).CurvePlot,
}));

const list = (texts: readonly string[]): string => texts.map((text) => formatDecimalText(text)).join(', ');

function CaseSheet({ suite, suiteCase }: { suite: SuiteRevisionView; suiteCase: SuiteCase }) {
  const navigate = useNavigate();
  const back = paths.suite(suite.suite, suite.number);
  const at = suite.cases.indexOf(suiteCase);
  const go = (step: number): void => {
    const next = suite.cases[at + step];
    if (next !== undefined) void navigate(paths.suiteCase(suite.suite, next.id, suite.number));
  };
  useKeys({ j: () => go(1), k: () => go(-1), escape: () => void navigate(back) });
  const facts: Fact[] = [];
  const parameters = Object.entries(suiteCase.parameters);
  if (parameters.length > 0) {
    facts.push({
      term: 'parameters',
      value: (
        <span className="num">
          {parameters.map(([name, text]) => `${name} = ${formatDecimalText(text)}`).join(', ')}
        </span>
      ),
      isLong: true,
    });
  }
  if (suiteCase.bracket !== null) {
    facts.push({
      term: 'bracket',
      value: <span className="num">{list(suiteCase.bracket)}</span>,
      isLong: true,
    });
  }
  if (suiteCase.starts.length > 0) {
    facts.push({
      term: suiteCase.starts.length === 1 ? 'starts' : `${suiteCase.starts.length} lists of starts`,
      value: <span className="num">{suiteCase.starts.map(list).join('; ')}</span>,
      isLong: true,
    });
  }
  facts.push({ term: 'traits', value: suiteCase.traits.join(', ') || 'none', isLong: true });
  return (
    <Page
      title={suiteCase.id}
      trail={[
        { label: 'Suites', to: paths.suites() },
        { label: suite.suite, to: back },
        { label: suiteCase.id },
      ]}
      keys={[
        { keys: ['j', 'k'], does: 'next, previous case' },
        { keys: ['esc'], does: 'back to the suite' },
      ]}
    >
      <VerdictBlock
        sign={suiteCase.id}
        colour="text-ink"
        note={
          <p>
            Case {at + 1} of {suite.cases.length}.
          </p>
        }
        sentence={<span className="num wrap-anywhere">{formatEquation(suiteCase.equation)} = 0</span>}
        lead={suiteCase.note === '' ? undefined : suiteCase.note}
      >
        <Facts facts={facts} />
      </VerdictBlock>
      <Entry
        title="Roots"
        note="Found to this many digits and certified; errors are measured against them, never against a root rounded to binary64."
      >
        {suiteCase.roots.length > 0 ? (
          <RootList roots={suiteCase.roots} />
        ) : (
          <StateNote title={suiteCase.expectation === 'none' ? 'There is no root' : 'No root is certified'}>
            {suiteCase.expectation === 'none'
              ? 'A solver that says so is right, and that counts as rightly refused.'
              : 'Solves are judged by what is certified on the spot.'}
          </StateNote>
        )}
      </Entry>
      <Entry title="Plot" note="f over the bracket, or around the starts; roots are dots.">
        <Suspense fallback={<LoadingStrokes label="Drawing" />}>
          <CurvePlot
            equation={suiteCase.equation}
            parameters={suiteCase.parameters}
            bracket={
              suiteCase.bracket === null ? null : [Number(suiteCase.bracket[0]), Number(suiteCase.bracket[1])]
            }
            roots={suiteCase.roots.map((root) => Number(root.value))}
            around={suiteCase.bracket === null ? suiteCase.starts.flat().map(Number) : []}
          />
        </Suspense>
      </Entry>
      <Entry title="Source">
        <p className="max-w-[78em] border-t border-rule-strong pt-2">{suiteCase.source}</p>
        <p className="mt-1 text-note text-ink-3">
          As written: <code className="wrap-anywhere text-figure">{suiteCase.equation}</code>
        </p>
      </Entry>
    </Page>
  );
}

/** One case of a suite at a revision. */
export function CasePage() {
  const { suite: slug = '', case: caseId = '' } = useParams();
  const asked = Number(useViewState().get('revision')) || null;
  const suite = useQuery({ ...suiteQuery(slug), enabled: asked === null });
  const number = asked ?? suite.data?.revision ?? null;
  const revision = useQuery({ ...suiteRevisionQuery(slug, number ?? 0), enabled: number !== null });
  const suiteCase = revision.data?.cases.find((one) => one.id === caseId);
  if (revision.data && suiteCase) return <CaseSheet suite={revision.data} suiteCase={suiteCase} />;
  const shown = asked === null && suite.data === undefined ? suite : revision;
  return (
    <Page
      title={caseId}
      trail={[
        { label: 'Suites', to: paths.suites() },
        { label: slug, to: paths.suite(slug) },
        { label: caseId },
      ]}
    >
      <Entry title="Case">
        <QueryState<unknown> query={shown} what="the case">
          {() => (
            <StateNote isProblem title="There is no such case">
              This revision of {slug} has no case “{caseId}”.
            </StateNote>
          )}
        </QueryState>
      </Entry>
    </Page>
  );
}

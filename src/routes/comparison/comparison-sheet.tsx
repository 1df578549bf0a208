import { Link } from 'react-router';
import type { Comparison } from '../../../shared/comparison/comparison.ts';
import { describeComparison } from '../../../shared/comparison/sentences.ts';
import { effectiveLimit } from '../../../shared/comparison/verdict.ts';
import type { AllowanceRevisionView } from '../../../shared/schemas/allowance-revisions.ts';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { ComparisonView, PairView } from '../../../shared/schemas/comparisons.ts';
import type { RunBase, RunDetail } from '../../../shared/schemas/runs.ts';
import { VerdictSign, verdictColour } from '../../components/marks/verdict-sign.tsx';
import { Entry } from '../../components/sheet/entry.tsx';
import { type Fact, Facts } from '../../components/sheet/facts.tsx';
import { Page } from '../../components/sheet/page.tsx';
import { VerdictBlock } from '../../components/sheet/verdict-block.tsx';
import { RichText } from '../../components/ui/rich-text.tsx';
import { breachSentence, breachTerms } from '../../features/comparisons/breach-sentences.ts';
import { writeBase } from '../../features/comparisons/comparisons.queries.ts';
import { findingLines } from '../../features/comparisons/finding-sentences.ts';
import { TotalsTable } from '../../features/comparisons/totals-table.tsx';
import { allowanceSummary } from '../../lib/allowance-words.ts';
import { formatCommit, formatDateTime } from '../../lib/format.ts';
import { paths } from '../../paths.ts';
import { ComparisonActions } from './comparison-actions.tsx';
import { ComparisonCosts } from './comparison-costs.tsx';
import { ComparisonPairs } from './comparison-pairs.tsx';

export interface ComparisonSheetProps {
  comparison: ComparisonView;
  pairs: PairView[];
  cases: SuiteCase[];
  run: RunDetail;
  base: RunBase;
  allowances: AllowanceRevisionView;
}

/** The view as the sentences need it; they take names and counts alone. */
function asComparison(view: ComparisonView, pairs: PairView[]): Comparison {
  return {
    ...view,
    reference: view.reference.label,
    candidate: view.candidate.label,
    pairs,
    notApplicable: [],
  };
}

function Side({ side, build }: { side: ComparisonView['candidate']; build: boolean }) {
  const label = side.build === null ? side.label : formatCommit(side.build.commit ?? side.build.label);
  const text = (
    <>
      <span className="num">{label}</span>
      {side.build !== null && side.build.commit !== null && side.build.label !== label
        ? ` ${side.build.label}`
        : ''}
    </>
  );
  const name = side.build !== null && build ? <Link to={paths.build(side.build.id)}>{text}</Link> : text;
  if (side.run !== null) {
    return (
      <>
        {name}, <Link to={paths.run(side.run)}>run {side.run}</Link>
      </>
    );
  }
  return name;
}

/** What a change did: verdict, totals, pairs, query check. */
export function ComparisonSheet({ comparison, pairs, cases, run, base, allowances }: ComparisonSheetProps) {
  const words = describeComparison(asComparison(comparison, pairs));
  const back = paths.comparison(run.id, writeBase(base));
  const pairHref = (pair: PairView): string => {
    const shown = pair.candidate ?? pair.reference;
    return paths.solve(shown?.id ?? 0, {
      against: pair.candidate === null ? undefined : (pair.reference?.id ?? undefined),
      back,
    });
  };
  const allowanceOf = (solver: string): number | null =>
    effectiveLimit(allowances.allowances, 'totalPercent', solver, []).limit;
  const findings = findingLines(comparison.totals);
  const quiet = findings.filter((line) => line.sentences.length === 0).map((line) => line.term);
  const facts: Fact[] = [
    { term: 'candidate', value: <Side side={comparison.candidate} build /> },
    { term: 'reference', value: <Side side={comparison.reference} build /> },
    {
      term: 'suite',
      value: (
        <Link to={paths.suite(run.suite.slug, run.suite.revision)}>
          {run.suite.slug}, revision <span className="num">{run.suite.revision}</span>
        </Link>
      ),
    },
    {
      term: 'arithmetic',
      value: comparison.exact ? 'the same for both' : 'not the same; see above',
    },
  ];
  if (run.finishedAt !== null) facts.push({ term: 'ran', value: formatDateTime(run.finishedAt) });
  const label = formatCommit(run.build.commit ?? run.build.label);
  return (
    <Page
      title={`Comparison of run ${run.id}`}
      trail={[
        { label: run.library, to: paths.library(run.library) },
        { label: `Build ${label}`, to: paths.build(run.build.id) },
        { label: `Run ${run.id}`, to: paths.run(run.id) },
        { label: 'Comparison' },
      ]}
      keys={[
        { keys: ['j', 'k'], does: 'next, previous pair' },
        { keys: ['enter'], does: 'open the pair' },
        { keys: ['f'], does: 'narrow' },
        { keys: ['1', '…', '9'], does: 'changes on and off' },
        { keys: ['o'], does: 'another order' },
        { keys: ['c'], does: 'code beside' },
        { keys: ['e'], does: 'export' },
        { keys: ['r'], does: 'run again' },
        { keys: ['esc'], does: 'back to the run' },
      ]}
    >
      <VerdictBlock
        sign={
          <>
            <VerdictSign verdict={comparison.verdict} isPlain /> {comparison.verdict}
          </>
        }
        colour={verdictColour[comparison.verdict]}
        note={<p>{allowanceSummary(allowances.number, allowances.allowances.base)}</p>}
        sentence={<RichText pieces={words.verdict} />}
        lead={
          words.lead.length === 0
            ? undefined
            : words.lead.map((sentence) => (
                <span key={sentence.map((piece) => piece.text).join('')}>
                  <RichText pieces={sentence} />{' '}
                </span>
              ))
        }
        actions={<ComparisonActions run={run} base={base} />}
      >
        <Facts facts={facts} />
      </VerdictBlock>
      {comparison.breaches.length > 0 && (
        <Entry title="Beyond" note="Each allowance that the candidate does not keep.">
          <ul className="finds">
            {comparison.breaches.map((breach) => (
              <li key={`${breach.allowance} ${breach.scope.solver ?? ''} ${breach.scope.trait ?? ''}`}>
                <b className="font-medium">{breachTerms[breach.allowance]}</b>
                <span>
                  <RichText pieces={breachSentence(breach)} />
                </span>
              </li>
            ))}
          </ul>
        </Entry>
      )}
      <Entry
        title="Totals"
        note="Cost is counted only over pairs that both builds solved. A solver that became cheap by giving up is not cheaper."
      >
        <TotalsTable comparison={comparison} pairs={pairs} allowanceOf={allowanceOf} pairHref={pairHref} />
      </Entry>
      <ComparisonCosts pairs={pairs} candidate={run.id} base={base} />
      <ComparisonPairs pairs={pairs} cases={cases} pairHref={pairHref} candidate={run.id} base={base} />
      <Entry title="Query check" note="What the paths show without being asked. Findings, not failures.">
        <ul className="finds">
          {findings
            .filter((line) => line.sentences.length > 0)
            .map((line) => (
              <li key={line.term}>
                <b className="font-medium">{line.term}</b>
                <span>
                  {line.sentences.map((sentence) => (
                    <span key={sentence.key} className="block">
                      <RichText pieces={sentence.pieces} />
                    </span>
                  ))}
                </span>
              </li>
            ))}
          {quiet.length > 0 && (
            <li>
              <b className="font-medium">{quiet.join(', ')}</b>
              <span className="text-table text-ink-3">nothing noticed</span>
            </li>
          )}
        </ul>
      </Entry>
    </Page>
  );
}

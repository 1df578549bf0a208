import { Link } from 'react-router';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import type { SolveDetail } from '../../../shared/schemas/runs.ts';
import { type Fact, Facts } from '../../components/sheet/facts.tsx';
import { formatDecimalText, formatFigure } from '../../lib/format.ts';
import { formatEquation } from '../../lib/format-equation.ts';

export interface SolveFactsProps {
  solve: SolveDetail;
  suiteCase: SuiteCase;
  caseHref: string;
  budget: number;
}

const list = (texts: readonly string[]): string =>
  texts.map((text) => formatDecimalText(text, 24)).join(', ');

function given(solve: SolveDetail, suiteCase: SuiteCase): Fact[] {
  const facts: Fact[] = [];
  const { takes } = solve.declaration;
  if (suiteCase.bracket !== null && takes !== 'start') {
    facts.push({ term: 'bracket', value: <span className="num">{list(suiteCase.bracket)}</span> });
  }
  const starts = solve.start === null ? undefined : suiteCase.starts[solve.start];
  if (starts !== undefined && takes !== 'bracket') {
    const used = starts.slice(0, Math.max(1, solve.declaration.starts));
    facts.push({
      term: used.length === 1 ? 'start' : 'starts',
      value: <span className="num">{list(used)}</span>,
    });
  } else if (starts === undefined && takes === 'start' && suiteCase.bracket !== null) {
    facts.push({ term: 'starts', value: <span className="num">{list(suiteCase.bracket)}</span> });
  }
  return facts;
}

/** What the solver was given and asked for. */
export function SolveFacts({ solve, suiteCase, caseHref, budget }: SolveFactsProps) {
  const root = solve.nearest === null ? undefined : suiteCase.roots[solve.nearest];
  const { xabs, xrel, fabs } = solve.declaration.tolerance;
  const tolerances = Object.entries({ xabs, xrel, fabs }).filter(([, value]) => value > 0);
  const parameters = Object.entries(suiteCase.parameters);
  const facts: Fact[] = [
    {
      term: 'case',
      value: (
        <Link to={caseHref}>
          <span className="num">{formatEquation(suiteCase.equation)} = 0</span>
        </Link>
      ),
      isLong: true,
    },
  ];
  if (parameters.length > 0) {
    facts.push({
      term: 'parameters',
      value: (
        <span className="num">
          {parameters.map(([name, text]) => `${name} = ${formatDecimalText(text, 18)}`).join(', ')}
        </span>
      ),
    });
  }
  facts.push(...given(solve, suiteCase));
  if (root !== undefined) {
    facts.push({
      term: root.multiplicity > 1 ? `certified root, multiplicity ${root.multiplicity}` : 'certified root',
      value: <span className="num">{formatDecimalText(root.value, 48)}</span>,
      isLong: true,
    });
  }
  facts.push({
    term: 'asked for',
    value: (
      <>
        {tolerances.map(([name, value]) => (
          <span key={name}>
            {name} <span className="num">{formatDecimalText(String(value))}</span>,{' '}
          </span>
        ))}
        at most <span className="num">{formatFigure(budget)}</span> evaluations
      </>
    ),
  });
  if (suiteCase.traits.length > 0) facts.push({ term: 'traits', value: suiteCase.traits.join(', ') });
  return <Facts facts={facts} />;
}

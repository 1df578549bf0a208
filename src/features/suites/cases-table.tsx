import { Link } from 'react-router';
import type { SuiteCase } from '../../../shared/schemas/case.ts';
import { formatDecimalText, formatDigits } from '../../lib/format.ts';
import { formatEquation } from '../../lib/format-equation.ts';
import { attainableDigits } from '../../lib/strip-of-solve.ts';
import { useVisibleRows } from '../../lib/use-visible-rows.ts';

export interface CasesTableProps {
  cases: readonly SuiteCase[];
  caseHref: (suiteCase: SuiteCase) => string;
  onTrait: (trait: string) => void;
}

function RootCell({ suiteCase }: { suiteCase: SuiteCase }) {
  const [root, ...others] = suiteCase.roots;
  if (root === undefined) {
    return (
      <span className="font-sans text-ink-3">
        {suiteCase.expectation === 'none' ? 'no root' : 'none certified'}
      </span>
    );
  }
  return (
    <>
      {formatDecimalText(root.value, 20)}
      {root.multiplicity > 1 && <span className="font-sans text-ink-3"> ×{root.multiplicity}</span>}
      {others.length > 0 && <span className="font-sans text-ink-3"> and {others.length} more</span>}
    </>
  );
}

/** The cases of a suite, in its order. */
export function CasesTable({ cases, caseHref, onTrait }: CasesTableProps) {
  const visible = useVisibleRows(cases.length, 47);
  return (
    <table className="table table-rows over stack cases-table table-fixed" ref={visible.ref}>
      <colgroup>
        <col className="over-column" />
        <col />
        <col style={{ width: 210 }} />
        <col style={{ width: 230 }} />
        <col style={{ width: 80 }} />
        <col style={{ width: '24%' }} />
      </colgroup>
      <thead>
        <tr>
          <th scope="col">case</th>
          <th scope="col">f(x)</th>
          <th scope="col">bracket or starts</th>
          <th scope="col">certified root</th>
          <th scope="col" className="r">
            attainable
          </th>
          <th scope="col">traits</th>
        </tr>
      </thead>
      <tbody>
        {visible.before > 0 && <tr style={{ height: visible.before }} />}
        {cases.slice(visible.from, visible.to).map((suiteCase, offset) => (
          <tr key={suiteCase.id} data-index={visible.from + offset} ref={visible.measure}>
            <th scope="row" className="aside">
              <Link
                to={caseHref(suiteCase)}
                data-row-link
                className="wrap-anywhere text-table font-medium text-ink"
              >
                {suiteCase.id}
              </Link>
            </th>
            <td className="lead-cell font-mono text-figure">
              <span className="line-clamp-2 wrap-anywhere">{formatEquation(suiteCase.equation)}</span>
            </td>
            <td className="font-mono text-figure wrap-anywhere">
              {suiteCase.bracket !== null
                ? `[${suiteCase.bracket.map((end) => formatDecimalText(end, 10)).join(', ')}]`
                : suiteCase.starts
                    .slice(0, 2)
                    .map((list) => list.map((start) => formatDecimalText(start, 8)).join(', '))
                    .join('; ')}
            </td>
            <td className="fig">
              <RootCell suiteCase={suiteCase} />
            </td>
            <td className="fig r max-wide:text-left" data-label="attainable">
              {suiteCase.roots[0] === undefined ? '–' : formatDigits(attainableDigits(suiteCase.roots[0]))}
            </td>
            <td className="text-ink-2">
              <span className="flex flex-wrap gap-x-2.5">
                {suiteCase.traits.map((trait) => (
                  <button
                    key={trait}
                    type="button"
                    onClick={() => onTrait(trait)}
                    className="min-h-6 underline decoration-rule-strong underline-offset-3 hover:decoration-current"
                  >
                    {trait}
                  </button>
                ))}
              </span>
            </td>
          </tr>
        ))}
        {visible.after > 0 && <tr style={{ height: visible.after }} />}
      </tbody>
    </table>
  );
}

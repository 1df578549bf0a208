import type { SuiteCase } from '../../../shared/schemas/case.ts';
import { formatDecimalText, formatDigits } from '../../lib/format.ts';
import { attainableDigits } from '../../lib/strip-of-solve.ts';

export interface RootListProps {
  roots: SuiteCase['roots'];
}

/** Certified roots: value, how they were certified, what can be reached in binary64. */
export function RootList({ roots }: RootListProps) {
  return (
    <table className="table stack">
      <thead>
        <tr>
          <th scope="col">root</th>
          <th scope="col" className="r">
            digits certified
          </th>
          <th scope="col" className="r">
            multiplicity
          </th>
          <th scope="col">certified by</th>
          <th scope="col" className="r">
            attainable digits
          </th>
          <th scope="col">is an answer</th>
        </tr>
      </thead>
      <tbody>
        {roots.map((root) => (
          <tr key={root.value}>
            <td className="font-mono text-figure wrap-anywhere">{formatDecimalText(root.value)}</td>
            <td className="fig r max-wide:text-left" data-label="digits certified">
              {root.digits}
            </td>
            <td className="fig r max-wide:text-left" data-label="multiplicity">
              {root.multiplicity}
            </td>
            <td>{root.certificate}</td>
            <td className="fig r max-wide:text-left" data-label="attainable digits">
              {formatDigits(attainableDigits(root))}
            </td>
            <td>{root.allowed ? 'yes' : 'no: another root'}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

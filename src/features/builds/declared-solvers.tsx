import type { SolverDeclaration } from '../../../shared/schemas/solver.ts';
import { formatClaim, formatDecimalText } from '../../lib/format.ts';

export interface DeclaredSolversProps {
  solvers: readonly SolverDeclaration[];
}

const takesWords = {
  bracket: 'a bracket',
  both: 'a bracket and a start',
  point: 'a point',
  start: '',
} as const;
const usesWords: Record<string, string> = { f: 'f', df: 'f′', d2f: 'f″', jac: 'the Jacobian' };

function takes(solver: SolverDeclaration): string {
  if (solver.takes !== 'start') return takesWords[solver.takes];
  return solver.starts === 1 ? 'one start' : solver.starts === 2 ? 'two starts' : `${solver.starts} starts`;
}

/** The solvers that a build declares, as its manifest has them. */
export function DeclaredSolvers({ solvers }: DeclaredSolversProps) {
  return (
    <table className="table stack">
      <thead>
        <tr>
          <th scope="col">solver</th>
          <th scope="col">takes</th>
          <th scope="col">uses</th>
          <th scope="col" className="r">
            claims order
          </th>
          <th scope="col">promises</th>
          <th scope="col">settings</th>
        </tr>
      </thead>
      <tbody>
        {solvers.map((solver) => {
          const promised = Object.entries(solver.tolerance).filter(([, value]) => value > 0);
          return (
            <tr key={solver.name}>
              <th scope="row">{solver.name}</th>
              <td data-label="takes">{takes(solver)}</td>
              <td data-label="uses">{solver.uses.map((use) => usesWords[use] ?? use).join(', ')}</td>
              <td className="fig r max-wide:text-left" data-label="claims order">
                {formatClaim(solver.order)}
              </td>
              <td data-label="promises">
                {promised.length === 0 ? (
                  <span className="text-ink-3">nothing</span>
                ) : (
                  promised.map(([name, value]) => (
                    <span key={name} className="mr-2 whitespace-nowrap">
                      {name} <span className="num">{formatDecimalText(String(value))}</span>
                    </span>
                  ))
                )}
              </td>
              <td data-label="settings">
                {Object.entries(solver.settings).map(([name, value]) => (
                  <span key={name} className="mr-2 whitespace-nowrap">
                    {name} <span className="num">{String(value)}</span>
                  </span>
                ))}
              </td>
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}

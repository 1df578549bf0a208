import type { ReactNode } from 'react';
import { Link } from 'react-router';
import type { BuildView } from '../../../shared/schemas/builds.ts';
import { formatCommit, formatShortDate } from '../../lib/format.ts';

export interface BuildsTableProps {
  builds: readonly BuildView[];
  buildHref: (build: BuildView) => string;
  /** Cells that other resources fill. */
  renderSolved: (build: BuildView) => ReactNode;
  renderChanges: (build: BuildView) => ReactNode;
  renderVerdict: (build: BuildView) => ReactNode;
  chosen: readonly number[];
  onChoose: (build: BuildView) => void;
}

/** Builds, newest first; two of them can be chosen for a comparison. */
export function BuildsTable(props: BuildsTableProps) {
  return (
    <table className="table table-rows stack builds-table">
      <thead>
        <tr>
          <th scope="col">build</th>
          <th scope="col">what</th>
          <th scope="col">by</th>
          <th scope="col">when</th>
          <th scope="col" className="r">
            solved
          </th>
          <th scope="col">what changed</th>
          <th scope="col">verdict</th>
          <th scope="col">
            <span className="sr-only">choose for a comparison</span>
          </th>
        </tr>
      </thead>
      <tbody>
        {props.builds.map((build) => {
          const name = formatCommit(build.commit ?? build.label);
          return (
            <tr key={build.id}>
              <td className="lead-cell fig max-wide:order-1">
                <Link to={props.buildHref(build)} data-row-link data-build={build.id}>
                  {name}
                </Link>
              </td>
              <td className="all-columns max-wide:order-4">{build.label === name ? '' : build.label}</td>
              <td className="whitespace-nowrap text-ink-2 max-wide:order-6">{build.createdBy}</td>
              <td className="whitespace-nowrap text-ink-2 max-wide:order-2">
                {formatShortDate(build.createdAt)}
              </td>
              <td className="fig r max-wide:order-7">{props.renderSolved(build)}</td>
              <td className="all-columns max-wide:order-5">{props.renderChanges(build)}</td>
              <td className="max-wide:order-3">{props.renderVerdict(build)}</td>
              <td className="max-wide:order-8">
                <label className="inline-flex min-h-6 min-w-6 items-center justify-center">
                  <span className="sr-only">Choose {name} for a comparison</span>
                  <input
                    type="checkbox"
                    className="size-4 accent-ink"
                    checked={props.chosen.includes(build.id)}
                    onChange={() => props.onChoose(build)}
                  />
                </label>
              </td>
            </tr>
          );
        })}
      </tbody>
    </table>
  );
}

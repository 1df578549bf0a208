import type { ReactNode } from 'react';
import type { Recipe } from '../../../shared/schemas/builds.ts';

export interface RecipeListProps {
  recipe: Recipe;
  /** Where it runs; null where that is not decided yet. */
  folder: string | null;
}

/** What the manifest says about running the build. */
export function RecipeList({ recipe, folder }: RecipeListProps) {
  const environment = Object.entries(recipe.environment);
  const rows: { term: string; body: ReactNode }[] = [
    ...(folder === null
      ? []
      : [{ term: 'folder', body: <code className="wrap-anywhere text-figure">{folder}</code> }]),
    { term: 'adapter', body: <code className="wrap-anywhere text-figure">{recipe.adapter}</code> },
    {
      term: 'prepared by',
      body:
        recipe.prepare.length === 0 ? (
          <span className="text-ink-3">nothing; it runs as it is</span>
        ) : (
          <ol className="list-none">
            {recipe.prepare.map((line) => (
              <li key={line}>
                <code className="wrap-anywhere text-figure">{line}</code>
              </li>
            ))}
          </ol>
        ),
    },
    {
      term: 'environment',
      body:
        environment.length === 0 ? (
          <span className="text-ink-3">nothing set</span>
        ) : (
          <code className="wrap-anywhere text-figure">
            {environment.map(([name, value]) => `${name}=${value}`).join(' ')}
          </code>
        ),
    },
  ];
  return (
    <ul className="finds">
      {rows.map((row) => (
        <li key={row.term}>
          <b className="font-medium">{row.term}</b>
          <span className="min-w-0">{row.body}</span>
        </li>
      ))}
    </ul>
  );
}

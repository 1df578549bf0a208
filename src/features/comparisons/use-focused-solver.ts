import { useEffect, useState } from 'react';

/** Solver of the pair whose row has, or last had, the focus. */
export function useFocusedSolver(): string | null {
  const [solver, setSolver] = useState<string | null>(null);
  useEffect(() => {
    function handleFocus({ target }: FocusEvent): void {
      if (target instanceof HTMLElement && target.dataset.solver !== undefined) {
        setSolver(target.dataset.solver);
      }
    }
    document.addEventListener('focusin', handleFocus);
    return () => document.removeEventListener('focusin', handleFocus);
  }, []);
  return solver;
}

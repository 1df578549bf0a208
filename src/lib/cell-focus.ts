/**
 * Moves the focus among links that carry `data-cell="row,column"`, so that a table of pictures can be
 * walked through without the mouse. Empty places are stepped over.
 */
export function moveCellFocus(rows: number, columns: number): void {
  const cells = new Map<string, HTMLElement>();
  let last = 0;
  for (const cell of document.querySelectorAll<HTMLElement>('[data-cell]')) {
    const key = cell.dataset.cell ?? '';
    cells.set(key, cell);
    last = Math.max(last, ...key.split(',').map(Number));
  }
  if (cells.size === 0) return;
  const at = document.activeElement instanceof HTMLElement ? document.activeElement.dataset.cell : undefined;
  if (at === undefined) {
    cells.values().next().value?.focus();
    return;
  }
  let [row = 0, column = 0] = at.split(',').map(Number);
  for (let tries = 0; tries <= last; tries += 1) {
    row += rows;
    column += columns;
    const cell = cells.get(`${row},${column}`);
    if (cell !== undefined) {
      cell.focus();
      cell.scrollIntoView({ block: 'nearest', inline: 'nearest' });
      return;
    }
  }
}

/**
 * Moves the focus along the row links of a page (elements with `data-row-link`). The chosen row is the one
 * whose link has the focus, so Enter opens it without further code and a screen reader hears its name.
 */
export function moveRowFocus(step: number, attribute = 'data-row-link'): void {
  const links = [...document.querySelectorAll<HTMLElement>(`[${attribute}]`)].filter(
    (link) => link.offsetParent !== null,
  );
  if (links.length === 0) return;
  const at = links.findIndex((link) => link.matches(':focus'));
  const next =
    at < 0 ? (step > 0 ? 0 : links.length - 1) : Math.min(links.length - 1, Math.max(0, at + step));
  links[next]?.focus();
  links[next]?.scrollIntoView({ block: 'nearest' });
}

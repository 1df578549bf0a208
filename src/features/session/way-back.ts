/**
 * The address to go to after signing in. Only one of this site: a link from elsewhere could otherwise lead
 * away from it, with the look of having come from it.
 */
export function readWayBack(search: string, home: string): string {
  const wanted = new URLSearchParams(search).get('back');
  if (wanted === null || !/^\/(?![/\\])/.test(wanted)) return home;
  // What a browser would read as another address once it has left out tabs and line ends.
  if (/[\p{Cc}\\]/u.test(wanted)) return home;
  return wanted;
}

/** What a mail's link carries behind the number sign, which no server sees. */
export function readToken(hash: string): string | null {
  const token = new URLSearchParams(hash.replace(/^#/, '')).get('token');
  return token === null || token === '' ? null : token;
}

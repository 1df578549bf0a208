/** Times leave as ISO 8601, UTC. */
export function toIso(ms: number): string {
  return new Date(ms).toISOString();
}

export function toIsoOrNull(ms: number | null): string | null {
  return ms === null ? null : toIso(ms);
}

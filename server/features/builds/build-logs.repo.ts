import type { BuildLogPiece } from '../../../shared/schemas/builds.ts';
import type { DatabaseClient } from '../../db/client.ts';

export function createBuildLogsRepo(client: DatabaseClient) {
  const { sqlite } = client;
  const insert = sqlite.prepare<[number, BuildLogPiece['kind'], string]>(
    'INSERT INTO build_logs (build_id, kind, text) VALUES (?, ?, ?)',
  );
  const size = sqlite
    .prepare<[number], number>('SELECT ifnull(sum(length(text)), 0) FROM build_logs WHERE build_id = ?')
    .pluck();
  const oldest = sqlite.prepare<[number], { id: number; length: number }>(
    'SELECT id, length(text) AS length FROM build_logs WHERE build_id = ? ORDER BY id',
  );
  const drop = sqlite.prepare<[number, number]>('DELETE FROM build_logs WHERE build_id = ? AND id <= ?');
  const markCut = sqlite.prepare<[number]>('UPDATE builds SET is_log_cut = 1 WHERE id = ?');
  const read = sqlite.prepare<[number, number], BuildLogPiece>(
    'SELECT id, kind, text FROM build_logs WHERE build_id = ? AND id > ? ORDER BY id',
  );

  return {
    append: (buildId: number, piece: Omit<BuildLogPiece, 'id'>): void => {
      insert.run(buildId, piece.kind, piece.text);
    },
    /** Drops the oldest pieces until no more than so many characters are left. */
    shorten(buildId: number, characters: number): void {
      let excess = (size.get(buildId) ?? 0) - characters;
      if (excess <= 0) return;
      let last = 0;
      for (const { id, length } of oldest.iterate(buildId)) {
        last = id;
        excess -= length;
        if (excess <= 0) break;
      }
      drop.run(buildId, last);
      markCut.run(buildId);
    },
    /** Pieces behind one that is known, in order. */
    read: (buildId: number, after: number): BuildLogPiece[] => read.all(buildId, after),
  };
}

export type BuildLogsRepo = ReturnType<typeof createBuildLogsRepo>;

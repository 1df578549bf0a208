import type { BuildLog, BuildLogPiece } from '../../../shared/schemas/builds.ts';
import type { BuildLogsRepo } from './build-logs.repo.ts';
import type { BuildsService } from './builds.service.ts';

/** What preparing a build has written so far. */
export function createBuildLogsService(deps: { logs: BuildLogsRepo; builds: BuildsService }) {
  return {
    get(id: number): BuildLog {
      const { state, reason, isLogCut } = deps.builds.require(id);
      return { build: id, state, reason, isCut: isLogCut, pieces: deps.logs.read(id, 0) };
    },
    /** What has come since a piece, and whether anything more can come. */
    follow(id: number, after: number) {
      // The state first: pieces are stored before it is final.
      const { state, reason } = deps.builds.require(id);
      const pieces: BuildLogPiece[] = deps.logs.read(id, after);
      return { pieces, state, reason, isOver: state === 'ready' || state === 'failed' };
    },
  };
}

export type BuildLogsService = ReturnType<typeof createBuildLogsService>;

import type { TokenScope } from '../../shared/permissions.ts';
import type { Actor } from '../actor.ts';

export interface PersonCaller {
  kind: 'person';
  id: string;
  name: string;
  email: string;
  isAdmin: boolean;
  isDemo: boolean;
  sessionId: string;
}

export interface BotCaller {
  kind: 'bot';
  tokenId: number;
  name: string;
  libraryId: number;
  scopes: readonly TokenScope[];
}

/** Who makes a request. */
export type Caller = { kind: 'nobody' } | PersonCaller | BotCaller;

export const nobody: Caller = { kind: 'nobody' };

/** Under which name it is written down. */
export function actorFor(caller: Caller): Actor {
  if (caller.kind === 'person') return { id: caller.id, name: caller.name };
  return { name: caller.kind === 'bot' ? `${caller.name} (token ${caller.tokenId})` : 'nobody' };
}

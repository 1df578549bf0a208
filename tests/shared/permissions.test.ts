import { describe, expect, it } from 'vitest';
import {
  type Action,
  type Asker,
  canSee,
  mayDo,
  permissions,
  roles,
  tokenScopes,
} from '../../shared/permissions.ts';

const actions = Object.keys(permissions).filter((name): name is Action => name in permissions);
const person = (isAdmin = false): Asker => ({ kind: 'person', isAdmin, roles: [] });
const bot = (scopes: (typeof tokenScopes)[number][]): Asker => ({ kind: 'bot', scopes });

describe('who may do what', () => {
  it('lets each role do all that the one before it may', () => {
    for (const action of actions)
      for (const visibility of ['public', 'private'] as const) {
        const may = roles.map((role) => {
          const asker: Asker = { kind: 'person', isAdmin: false, roles: [role] };
          return mayDo(action, asker, { visibility, role, isOwn: false });
        });
        expect(may, action).toEqual(may.toSorted());
      }
  });

  it('gives nobody anything of a library, and strangers nothing of a private one', () => {
    const ofLibrary = actions.filter((action) => permissions[action].on === 'library');
    expect(ofLibrary.length).toBeGreaterThan(10);
    for (const action of ofLibrary) {
      expect(mayDo(action, { kind: 'nobody' }, { visibility: 'public', role: null, isOwn: false })).toBe(
        false,
      );
      expect(mayDo(action, person(), { visibility: 'private', role: null, isOwn: false }), action).toBe(
        false,
      );
      expect(mayDo(action, person()), `${action} of no library`).toBe(false);
    }
  });

  it('lets an admin change nothing in a library but its members', () => {
    const changing = actions.filter((action) => {
      const standing = { visibility: 'private' as const, role: null, isOwn: false };
      return mayDo(action, person(true), standing) && !/\.(read|follow|list)$/.test(action);
    });
    expect(changing.filter((action) => permissions[action].on === 'library')).toEqual(['members.edit']);
  });

  it('keeps bots from accounts, members, tokens and settings, whatever their scopes', () => {
    const standing = { visibility: 'public' as const, role: null, isOwn: true };
    const may = actions.filter((action) => mayDo(action, bot([...tokenScopes]), standing));
    expect(
      may.filter((action) => /^(account|site|session|members|tokens)\.|edit|settings|accept/.test(action)),
    ).toEqual([]);
    expect(actions.filter((action) => mayDo(action, bot([]), standing))).toEqual([]);
    expect(canSee(bot([...tokenScopes]), { ...standing, isOwn: false })).toBe(false);
  });
});

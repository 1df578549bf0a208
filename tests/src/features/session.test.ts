import { afterEach, describe, expect, it, vi } from 'vitest';
import { AppError } from '../../../shared/errors.ts';
import { type Action, mayDo, permissions, roles } from '../../../shared/permissions.ts';
import { askerOf, type Person, personMay, roleIn, standingIn } from '../../../src/features/session/asker.ts';
import { forgetPerson, meQuery } from '../../../src/features/session/session.queries.ts';
import { readToken, readWayBack } from '../../../src/features/session/way-back.ts';
import { createQueryClient } from '../../../src/lib/query-client.ts';

function person(given: Partial<Person> = {}): Person {
  return {
    id: 'p1',
    name: 'Tobin Askeland',
    email: 'tobin@larkmoor.example',
    isAdmin: false,
    isDemo: true,
    memberships: [],
    ...given,
  };
}

const larkroots = { library: 'larkroots', name: 'larkroots', visibility: 'private' as const };
const actions = Object.keys(permissions).filter((name): name is Action => name in permissions);

afterEach(() => vi.unstubAllGlobals());

describe('personMay', () => {
  it('says for every action and role what the shared table says', () => {
    for (const role of roles) {
      const one = person({ memberships: [{ ...larkroots, role }] });
      for (const action of actions) {
        const standing = { visibility: 'private' as const, role, isOwn: false };
        const asker = { kind: 'person' as const, isAdmin: false, roles: [role] };
        expect(
          personMay(one, action, { slug: 'larkroots', visibility: 'private' }),
          `${role}: ${action}`,
        ).toBe(mayDo(action, asker, standing));
      }
    }
  });

  it('lets nobody in who is not signed in, but for what is open to everyone', () => {
    const open = actions.filter((action) => personMay(null, action, { slug: 'x', visibility: 'public' }));
    expect(open.sort()).toEqual(['about.read', 'session.open']);
  });

  it('takes a role from its own library alone', () => {
    const one = person({ memberships: [{ ...larkroots, role: 'maintainer' }] });
    expect(personMay(one, 'tokens.edit', { slug: 'larkroots', visibility: 'private' })).toBe(true);
    expect(personMay(one, 'tokens.edit', { slug: 'other', visibility: 'public' })).toBe(false);
    expect(personMay(one, 'library.read', { slug: 'other', visibility: 'public' })).toBe(true);
    expect(personMay(one, 'library.read', { slug: 'other', visibility: 'private' })).toBe(false);
  });

  it('gives an admin the members of every library, and no say in its builds', () => {
    const admin = person({ isAdmin: true });
    const library = { slug: 'larkroots', visibility: 'private' as const };
    expect(personMay(admin, 'members.edit', library)).toBe(true);
    expect(personMay(admin, 'build.register', library)).toBe(false);
  });
});

describe('askerOf and standingIn', () => {
  it('turn a person into what the table wants to know', () => {
    const one = person({ memberships: [{ ...larkroots, role: 'reviewer' }] });
    expect(askerOf(null)).toEqual({ kind: 'nobody' });
    expect(askerOf(one)).toEqual({ kind: 'person', isAdmin: false, roles: ['reviewer'] });
    expect(standingIn(one, { slug: 'larkroots', visibility: 'private' }).role).toBe('reviewer');
    expect(roleIn(one, 'other')).toBeNull();
  });
});

describe('readWayBack', () => {
  it('gives the address that was wanted, with its filters', () => {
    expect(readWayBack('?back=%2Fruns%2F4%3Foutcome%3Dcrashed', '/')).toBe('/runs/4?outcome=crashed');
  });

  it('leads home where none was wanted', () => {
    expect(readWayBack('', '/')).toBe('/');
  });

  it('never leads to another site', () => {
    for (const back of [
      'https://elsewhere.example/',
      '//elsewhere.example',
      '/\\elsewhere.example',
      '/\t/elsewhere.example',
      '/\n/elsewhere.example',
      'javascript:alert(1)',
      'runs/4',
    ])
      expect(readWayBack(`?back=${encodeURIComponent(back)}`, '/'), back).toBe('/');
  });
});

describe('readToken', () => {
  it('reads what stands behind the number sign, decoded', () => {
    expect(readToken('#token=a%2Bb')).toBe('a+b');
  });

  it('is null where the link was cut', () => {
    expect([readToken(''), readToken('#token='), readToken('#other=1')]).toEqual([null, null, null]);
  });
});

describe('the end of a session', () => {
  it('is noticed wherever the server says that nobody is signed in, and all that was read is forgotten', async () => {
    const client = createQueryClient(forgetPerson);
    client.setQueryData(meQuery.queryKey, { person: person() });
    client.setQueryData(['libraries', 'list'], ['larkroots']);
    const queryFn = () => Promise.reject(new AppError('unauthenticated', 'Sign in first.'));
    await client.fetchQuery({ queryKey: ['runs', 1], queryFn }).catch(() => {});
    expect(client.getQueryData(meQuery.queryKey)).toEqual({ person: null });
    expect(client.getQueryData(['libraries', 'list'])).toBeUndefined();
  });

  it('is not read into another error', async () => {
    const client = createQueryClient(forgetPerson);
    client.setQueryData(meQuery.queryKey, { person: person() });
    const queryFn = () => Promise.reject(new AppError('forbidden', 'You may not do this here.'));
    await client.fetchQuery({ queryKey: ['runs', 1], queryFn }).catch(() => {});
    expect(client.getQueryData(meQuery.queryKey)?.person?.name).toBe('Tobin Askeland');
  });
});

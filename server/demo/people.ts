import type { Role } from '../../shared/permissions.ts';
import { type Actor, localActor } from '../actor.ts';
import type { Services } from '../features/services.ts';

export interface DemoPerson {
  name: string;
  email: string;
  isAdmin: boolean;
  /** In the demo's library. */
  role: Role | null;
}

/** The invented people of the demo: the ones who write larkroots, and one who looks after the site. */
export const demoPeople: readonly DemoPerson[] = [
  { name: 'Maud Ferreday', email: 'maud@larkmoor.example', isAdmin: false, role: 'maintainer' },
  { name: 'Ilse Varga-Holm', email: 'ilse@larkmoor.example', isAdmin: false, role: 'reviewer' },
  { name: 'Tobin Askeland', email: 'tobin@larkmoor.example', isAdmin: false, role: 'contributor' },
  { name: 'Orla Brandvik', email: 'orla@larkmoor.example', isAdmin: false, role: 'contributor' },
  { name: 'Jonna Petterwick', email: 'jonna@larkmoor.example', isAdmin: true, role: null },
];

/** Makes them, or finds them again; gives who acts under each name. */
export function ensureDemoPeople(services: Services): (name: string) => Actor {
  const actors = new Map(
    demoPeople.map(({ name, email, isAdmin }) => {
      const { id } = services.people.ensureDemoPerson({ name, email, isAdmin });
      return [name, { id, name }];
    }),
  );
  return (name) => {
    const actor = actors.get(name);
    if (!actor) throw new RangeError(`${name} is nobody of the demo`);
    return actor;
  };
}

/** Gives them their roles in the demo's library; whoever is a member already keeps the role. */
export function settleDemoPeople(services: Services, library: string): void {
  const actorOf = ensureDemoPeople(services);
  const known = new Set(services.members.list(library, false).map((member) => member.person));
  const { id: libraryId } = services.libraries.require(library);
  const hasMembers = known.size > 0;
  for (const { name, role } of demoPeople) {
    const { id } = actorOf(name);
    const by = hasMembers ? actorOf('Maud Ferreday') : localActor;
    if (id !== undefined && role !== null && !known.has(id)) services.members.add(by, libraryId, id, role);
  }
}

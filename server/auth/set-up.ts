import { createHash, randomBytes, timingSafeEqual } from 'node:crypto';
import type { z } from 'zod';
import { AppError } from '../../shared/errors.ts';
import type { setUpBody } from '../../shared/schemas/people.ts';
import type { PeopleService } from '../features/people/people.service.ts';

const digest = (text: string) => createHash('sha256').update(text).digest();

/**
 * How a site gets its first admin: whoever reads the server's output has the code. Open while nobody has an
 * account (but the invented people of a demo that is over); people are never deleted, so that it does not
 * open again.
 */
export function createSetUp({ people, hasDemo }: { people: PeopleService; hasDemo: boolean }) {
  const code = randomBytes(9).toString('base64url');
  const isDemo = () => hasDemo && people.listDemo().length > 0;
  const isOpen = () => !people.hasRealPeople() && !isDemo();
  return {
    code,
    isOpen,
    async makeFirstAdmin(body: z.output<typeof setUpBody>) {
      if (!isOpen()) throw new AppError('gone', 'This site has been set up already.');
      if (!timingSafeEqual(digest(body.code), digest(code)))
        throw new AppError('forbidden', 'This is not the code that the server printed when it started.');
      return people.makeFirstAdmin(body, await people.hash(body.password));
    },
  };
}

export type SetUp = ReturnType<typeof createSetUp>;

import { accuracyChapter } from './accuracy.ts';
import { adapterChapter } from './adapter.ts';
import { allowancesChapter } from './allowances.ts';
import { cautionChapter } from './caution.ts';
import { changesChapter } from './changes.ts';
import { digitStripChapter } from './digit-strip.ts';
import { equationsChapter } from './equations.ts';
import { fingerprintChapter } from './fingerprint.ts';
import { manifestChapter } from './manifest.ts';
import { orderChapter } from './order.ts';
import { outcomesChapter } from './outcomes.ts';
import { queryCheckChapter } from './query-check.ts';
import type { Chapter, ChapterId } from './section.ts';
import { suitesChapter } from './suites.ts';
import { wireChapter } from './wire.ts';

const byId: Record<ChapterId, Chapter> = {
  adapter: adapterChapter,
  wire: wireChapter,
  manifest: manifestChapter,
  equations: equationsChapter,
  suites: suitesChapter,
  outcomes: outcomesChapter,
  changes: changesChapter,
  'query-check': queryCheckChapter,
  order: orderChapter,
  allowances: allowancesChapter,
  accuracy: accuracyChapter,
  'digit-strip': digitStripChapter,
  fingerprint: fingerprintChapter,
  caution: cautionChapter,
};

/** The guide, in the order in which a newcomer reads it. */
export const chapters: readonly Chapter[] = Object.values(byId);

export function chapterOf(id: ChapterId): Chapter {
  return byId[id];
}

import { kitList } from '../../../shared/schemas/kits.ts';
import { type ApiEntry, named, ok, unchanged } from '../../openapi/entry.ts';

export const kitsApi: readonly ApiEntry[] = [
  {
    method: 'get',
    path: '/kits',
    chapter: 'Kits',
    summary: 'Lists the adapter kits that come with the product.',
    answers: [ok(named('KitList', kitList))],
    problems: [],
  },
  {
    method: 'get',
    path: '/kits/:kit.tar.gz',
    chapter: 'Kits',
    summary: 'Sends an adapter kit as an archive.',
    answers: [
      { status: 200, meaning: 'The files of the kit, in one folder.', mediaTypes: ['application/gzip'] },
      unchanged,
    ],
    problems: ['not_found'],
  },
];

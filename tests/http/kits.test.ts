import { mkdtempSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import request from 'supertest';
import { extract } from 'tar';
import { describe, expect, it } from 'vitest';
import { kitList } from '../../shared/schemas/kits.ts';
import { problem } from '../../shared/schemas/problem.ts';
import { openTestApp, scratchFolder } from '../helpers/app.ts';

const kitFolder = fileURLToPath(new URL('../../server/kits/node', import.meta.url));

describe('GET /api/kits', () => {
  it('lists each kit with its title and its files', async () => {
    const { app } = openTestApp();
    const { items } = kitList.parse((await request(app).get('/api/kits').expect(200)).body);
    const node = items.find((kit) => kit.name === 'node');
    expect(node?.title).toBe('Adapter kit for Node.js');
    expect(node?.files).toEqual(
      expect.arrayContaining(['README.md', 'adapter.mjs', 'example/tallyroot.yaml']),
    );
  });
});

describe('GET /api/kits/:kit.tar.gz', () => {
  it('sends an archive that unpacks to the files of the kit, byte for byte', async () => {
    const { app } = openTestApp();
    const answer = await request(app).get('/api/kits/node.tar.gz').buffer().expect(200);
    expect(answer.headers['content-type']).toBe('application/gzip');
    expect(answer.headers['content-disposition']).toBe('attachment; filename="tallyroot-kit-node.tar.gz"');
    const into = mkdtempSync(path.join(scratchFolder, 'kit-'));
    const { items } = kitList.parse((await request(app).get('/api/kits')).body);
    const { files = [] } = items.find((kit) => kit.name === 'node') ?? {};
    const unpacking = extract({ cwd: into });
    unpacking.end(answer.body);
    await new Promise((resolve, reject) => unpacking.on('close', resolve).on('error', reject));
    expect(files.length).toBeGreaterThan(3);
    for (const file of files)
      expect(readFileSync(path.join(into, 'tallyroot-kit-node', file)), file).toEqual(
        readFileSync(path.join(kitFolder, file)),
      );
  });

  it('is not sent again to who has it', async () => {
    const { app } = openTestApp();
    const first = await request(app).get('/api/kits/node.tar.gz').buffer();
    await request(app)
      .get('/api/kits/node.tar.gz')
      .set('If-None-Match', String(first.headers.etag))
      .expect(304);
  });

  it('knows no other names, and none that leave the folder of the kits', async () => {
    const { app } = openTestApp();
    for (const name of ['perl', '..', '%2e%2e%2fdemo', 'node%2f..']) {
      const answer = await request(app).get(`/api/kits/${name}.tar.gz`).expect(404);
      expect(problem.parse(answer.body).code).toBe('not_found');
    }
  });
});

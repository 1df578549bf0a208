import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { breachesOf, importsOf, sourceFiles } from './helpers/import-rules.ts';

const root = fileURLToPath(new URL('..', import.meta.url));

describe('import directions', () => {
  it('hold in every file of shared, server and src', () => {
    const files = ['shared', 'server', 'src'].flatMap((folder) => sourceFiles(root, folder));
    expect(files.length).toBeGreaterThan(10);
    expect(files.flatMap(({ file, source }) => breachesOf(file, source))).toEqual([]);
  });

  it('are seen to be broken where a breach is planted', () => {
    const planted: [string, string][] = [
      ['shared/numerics/a.ts', "import { readFileSync } from 'node:fs';"],
      ['shared/numerics/a.ts', "import { db } from '../../server/db/client.ts';"],
      ['shared/numerics/a.ts', "import React from 'react';"],
      ['server/app.ts', "import { Page } from '../src/routes/page.tsx';"],
      ['server/app.ts', "import { build } from '../tests/helpers/builders.ts';"],
      ['server/features/runs/runs.service.ts', 'const port = process.env.PORT;'],
      ['server/features/runs/runs.routes.ts', "import { listRuns } from './runs.repo.ts';"],
      ['server/http/session.ts', "import { findUser } from '../features/users/users.repo.ts';"],
      ['src/main.tsx', "import { createApp } from '../server/app.ts';"],
      ['src/lib/api.ts', "import { join } from 'node:path';"],
      ['src/features/runs/run-table.tsx', "const other = import('../builds/build-list.tsx');"],
    ];
    for (const [file, source] of planted) {
      expect(breachesOf(file, source), `${file}: ${source}`).toHaveLength(1);
    }
  });

  it('are read from imports of one line, of several lines and from dynamic ones', () => {
    const source =
      "import {\n  a,\n  b,\n} from 'one';\nexport { c } from 'two';\nimport 'three';\nimport type { D } from 'four';\nawait import('five');";
    expect(importsOf(source)).toEqual(['one', 'two', 'three', 'four', 'five']);
  });
});

import { describe, expect, it } from 'vitest';
import { createAllowancesRepo } from '../../../server/features/allowances/allowances.repo.ts';
import { createAuditRepo } from '../../../server/features/audit/audit.repo.ts';
import { createBuildsRepo } from '../../../server/features/builds/builds.repo.ts';
import { createLibrariesRepo } from '../../../server/features/libraries/libraries.repo.ts';
import { trendRunsSql, trendSql } from '../../../server/features/libraries/trends.repo.ts';
import { createPeopleRepo } from '../../../server/features/people/people.repo.ts';
import {
  createReferencesRepo,
  entriesPageQuery,
} from '../../../server/features/references/references.repo.ts';
import { createRunsRepo } from '../../../server/features/runs/runs.repo.ts';
import { solveListSql } from '../../../server/features/runs/solve-list.repo.ts';
import { createSolversRepo } from '../../../server/features/solvers/solvers.repo.ts';
import { createSuitesRepo } from '../../../server/features/suites/suites.repo.ts';
import { nextJobSql } from '../../../server/jobs/queue.ts';
import { createOutboxRepo } from '../../../server/mail/outbox.repo.ts';
import { solveSorts } from '../../../shared/schemas/runs.ts';
import { openTestApp } from '../../helpers/app.ts';

const { client } = openTestApp();

function planOf(sql: string, parameters: unknown[] | Record<string, unknown>): string {
  const explain = client.sqlite.prepare<unknown[], { detail: string }>(`EXPLAIN QUERY PLAN ${sql}`);
  const rows = Array.isArray(parameters) ? explain.all(...parameters) : explain.all(parameters);
  return rows.map((row) => row.detail).join('\n');
}

function plan(query: { toSQL(): { sql: string; params: unknown[] } }): string {
  const { sql, params } = query.toSQL();
  return planOf(sql, params);
}

describe('query plans', () => {
  const limit = 51;
  const lists: [string, string, RegExp][] = [
    [
      'runs of what is visible',
      plan(
        createRunsRepo(client).listQuery({ visible: { kind: 'of person', person: 'x' }, before: 9, limit }),
      ),
      /SEARCH runs USING INTEGER PRIMARY KEY \(rowid<\?\)[\s\S]*SEARCH l (EXISTS )?USING INTEGER PRIMARY KEY/,
    ],
    [
      'people',
      plan(createPeopleRepo(client.db).listQuery({ after: ['a', 'b'], limit })),
      /USING INDEX users_name/,
    ],
    [
      'mails in a state',
      plan(createOutboxRepo(client.db).listQuery({ state: 'waiting', before: 9, limit })),
      /SEARCH mail_outbox USING INDEX mail_outbox_state \(state=\? AND id<\?\)/,
    ],
    [
      'runs of a library',
      plan(createRunsRepo(client).listQuery({ libraryId: 1, before: 9, limit })),
      /SEARCH runs USING INDEX runs_library \(library_id=\? AND id<\?\)/,
    ],
    [
      'runs of a build',
      plan(createRunsRepo(client).listQuery({ buildId: 1, limit })),
      /SEARCH runs USING INDEX runs_build \(build_id=\?\)/,
    ],
    [
      'runs on a suite',
      plan(createRunsRepo(client).listQuery({ suiteId: 1, limit })),
      /SEARCH runs USING INDEX runs_suite \(suite_id=\?\)/,
    ],
    [
      'runs in a status',
      plan(createRunsRepo(client).listQuery({ status: 'running', before: 9, limit })),
      /SEARCH runs USING INDEX runs_status \(status=\? AND id<\?\)/,
    ],
    [
      'all runs',
      plan(createRunsRepo(client).listQuery({ before: 9, limit })),
      /SEARCH runs USING INTEGER PRIMARY KEY \(rowid<\?\)/,
    ],
    [
      'builds of a library',
      plan(createBuildsRepo(client.db).listQuery({ libraryId: 1, before: 9, limit })),
      /SEARCH builds USING INDEX builds_library \(library_id=\? AND id<\?\)/,
    ],
    [
      'libraries',
      plan(createLibrariesRepo(client.db).listQuery({ after: 'a', limit })),
      /SEARCH libraries USING INDEX libraries_slug \(slug>\?\)/,
    ],
    [
      'solvers of a library',
      plan(createSolversRepo(client.db).listQuery(1)),
      /SEARCH solvers USING INDEX solvers_library_name/,
    ],
    [
      'suites',
      plan(createSuitesRepo(client.db).listQuery({ after: 'a', limit })),
      /SEARCH suites USING INDEX suites_slug \(slug>\?\)/,
    ],
    [
      'revisions of a suite',
      plan(createSuitesRepo(client.db).listRevisionsQuery({ suiteId: 1, before: 9, limit })),
      /USING INDEX suite_revisions_suite_number \(suite_id=\? AND number<\?\)/,
    ],
    [
      'allowances of a library',
      plan(createAllowancesRepo(client.db).listQuery({ libraryId: 1, limit })),
      /USING INDEX allowance_revisions_library_number/,
    ],
    [
      'audit log of a library',
      plan(createAuditRepo(client.db).listQuery({ libraryId: 1, before: 9, limit })),
      /SEARCH audit_log USING INDEX audit_log_library \(library_id=\? AND id<\?\)/,
    ],
    [
      'references of a library',
      plan(createReferencesRepo(client).listQuery({ libraryId: 1, limit })),
      /SEARCH reference_chains USING (COVERING )?INDEX|SEARCH reference_revisions USING INTEGER PRIMARY KEY|SCAN reference_revisions/,
    ],
  ];

  it.each(lists)('%s: an index finds and orders the rows', (name, text, expected) => {
    expect(text).toMatch(expected);
    if (name !== 'references of a library') expect(text).not.toMatch(/TEMP B-TREE|SCAN (?!CONSTANT)/);
  });

  it('pages through the solves of a run along its unique index, without sorting', () => {
    const { sql, parameters } = solveListSql({
      runId: 1,
      sort: 'solver',
      direction: 'up',
      limit,
      after: [1, 2, 3],
    });
    const text = planOf(sql, parameters);
    expect(text).toMatch(/SEARCH solves USING INDEX solves_key \(run_id=\?/);
    expect(text).not.toMatch(/TEMP B-TREE|SCAN/);
  });

  it.each(solveSorts)('never leaves the rows of the run when solves are sorted by %s', (sort) => {
    for (const direction of ['up', 'down'] as const) {
      const { sql, parameters } = solveListSql({
        runId: 1,
        solver: 2,
        outcomes: ['refused', 'crashed'],
        caseIds: [1, 2],
        sort,
        direction,
        limit,
      });
      expect(planOf(sql, parameters)).toMatch(/SEARCH solves USING INDEX solves_key \(run_id=\?/);
      expect(planOf(sql, parameters)).not.toMatch(/SCAN solves/);
    }
  });

  it('reads all solves of a run, and the keys of those stored, by index', () => {
    const all = planOf('SELECT * FROM solves WHERE run_id = ? ORDER BY solver, case_id, start', [1]);
    expect(all).toMatch(/SEARCH solves USING INDEX solves_key/);
    expect(all).not.toMatch(/TEMP B-TREE/);
    const keys = planOf('SELECT solver, case_id, start FROM solves WHERE run_id = ?', [1]);
    expect(keys).toMatch(/SEARCH solves USING COVERING INDEX solves_key/);
  });

  it('finds the newest entry of each key of a reference by index', () => {
    const text = planOf(entriesPageQuery, {
      chain: 1,
      number: 3,
      solver: null,
      afterSolver: '',
      afterCase: '',
      afterStart: -2,
      limit,
    });
    expect(text).toMatch(/reference_entries USING COVERING INDEX reference_entries_key/);
    expect(text).not.toMatch(/SCAN (reference_entries|solves|e\b|r\b)/);
  });

  it('claims a job by index', () => {
    const text = planOf(nextJobSql, []);
    expect(text).toMatch(/SEARCH j USING INDEX jobs_status \(status=\?\)/);
    expect(text).not.toMatch(/TEMP B-TREE|SCAN/);
  });

  it('finds the runs of a trend and their solves by index', () => {
    const runs = planOf(trendRunsSql, [1, 1, 8]);
    expect(runs).toMatch(/SEARCH r USING COVERING INDEX runs_finished \(library_id=\? AND suite_id=\?\)/);
    expect(runs).not.toMatch(/TEMP B-TREE|SCAN/);
    const solves = planOf(trendSql, ['[1]']);
    expect(solves).toMatch(/SEARCH s USING INDEX solves_key \(run_id=\? AND solver=\?\)/);
    expect(solves).not.toMatch(/SCAN (s|cases|run_solvers|r)\b/);
  });
});

import { z } from 'zod';
import { suiteCase } from './case.ts';
import { pageOf } from './paging.ts';

export const suiteView = z.strictObject({
  slug: z.string(),
  title: z.string(),
  builtIn: z.boolean(),
  /** The newest revision. */
  revision: z.int().min(1),
  hash: z.string(),
  caseCount: z.int().min(0),
  createdAt: z.iso.datetime(),
  updatedAt: z.iso.datetime(),
});
export type SuiteView = z.infer<typeof suiteView>;
export const suitePage = pageOf(suiteView);

export const suiteRevisionSummary = z.strictObject({
  suite: z.string(),
  number: z.int().min(1),
  hash: z.string(),
  title: z.string(),
  limits: z.strictObject({ evaluations: z.int().min(1), seconds: z.number().positive() }),
  caseCount: z.int().min(0),
  note: z.string(),
  createdAt: z.iso.datetime(),
  createdBy: z.string(),
});
export type SuiteRevisionSummary = z.infer<typeof suiteRevisionSummary>;
export const suiteRevisionPage = pageOf(suiteRevisionSummary);

/** A revision with its cases and the text that it was made from. Never changes once it exists. */
export const suiteRevisionView = suiteRevisionSummary.extend({
  source: z.string(),
  cases: z.array(suiteCase),
});
export type SuiteRevisionView = z.infer<typeof suiteRevisionView>;

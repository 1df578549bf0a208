import { Router } from 'express';
import { z } from 'zod';
import { rowId } from '../../../shared/schemas/paging.ts';
import { runsQuery, solvesQuery, startRunBody } from '../../../shared/schemas/runs.ts';
import { stripsQuery } from '../../../shared/schemas/strips.ts';
import { sendEvents } from '../../http/event-stream.ts';
import { parseBody, parseRequest } from '../../http/parse-request.ts';
import { type FindTargets, needs, ofRun, ofSolve } from '../../http/permissions.ts';
import { accessOf, actorOf } from '../../http/session.ts';
import type { EventBus } from '../../jobs/event-bus.ts';
import type { RunsService } from './runs.service.ts';
import type { SolvesService } from './solves.service.ts';
import type { StripsService } from './strips.service.ts';

const byId = z.object({ run: rowId });
const ofNewRun: FindTargets = (request) => ({ build: parseBody(startRunBody, request).build });
const bySolve = z.object({ solve: rowId });

export function runsRoutes(
  runs: RunsService,
  solves: SolvesService,
  strips: StripsService,
  bus: EventBus,
): Router {
  const router = Router();
  router.get('/runs', needs('library.list'), (request, response) => {
    const query = parseRequest(runsQuery, request.query, 'query');
    const access = accessOf(response);
    if (query.library !== undefined) access.require('library.read', [{ library: query.library }]);
    response.json(runs.list(query, access.visible()));
  });
  router.post('/runs', needs('run.start', ofNewRun), (request, response) => {
    const run = runs.start(actorOf(response), parseBody(startRunBody, request));
    response.status(201).location(`/api/runs/${run.id}`).json(run);
  });
  router.get('/runs/:run', needs('run.follow', ofRun), (request, response) => {
    response.json(runs.getDetail(parseRequest(byId, request.params, 'address').run));
  });
  router.post('/runs/:run/cancel', needs('run.cancel', ofRun), (request, response) => {
    const { run } = parseRequest(byId, request.params, 'address');
    response.json(runs.cancel(actorOf(response), run));
  });
  router.post('/runs/:run/again', needs('run.start', ofRun), (request, response) => {
    const { run } = parseRequest(byId, request.params, 'address');
    const next = runs.again(actorOf(response), run);
    response.status(201).location(`/api/runs/${next.id}`).json(next);
  });
  router.get('/runs/:run/solves', needs('library.read', ofRun), (request, response) => {
    const { run } = parseRequest(byId, request.params, 'address');
    response.json(solves.list(run, parseRequest(solvesQuery, request.query, 'query')));
  });
  router.get('/strips', needs('library.list'), (request, response) => {
    const { solves: ids } = parseRequest(stripsQuery, request.query, 'query');
    // Solves of libraries that are not visible are left out, as are those that are not there.
    const access = accessOf(response);
    response.json({ items: strips.read(ids.filter((solve) => access.may('library.read', { solve }))) });
  });
  router.get('/solves/:solve', needs('library.read', ofSolve), (request, response) => {
    response.json(solves.get(parseRequest(bySolve, request.params, 'address').solve));
  });
  router.get('/runs/:run/events', needs('run.follow', ofRun), (request, response) => {
    const { run } = parseRequest(byId, request.params, 'address');
    const { library, status, phase, progress } = runs.get(run);
    const access = accessOf(response);
    sendEvents(response, {
      bus,
      first: { kind: 'run', run, library, status, phase, progress },
      filter: (event) => event.kind === 'run' && event.run === run,
      mayGoOn: () => access.isStillGood() && access.may('run.follow', { run }),
    });
  });
  router.get('/events', needs('events.follow'), (_request, response) => {
    const access = accessOf(response);
    sendEvents(response, {
      bus,
      filter: (event) => event.kind === 'suite' || access.canSee(event.library),
      mayGoOn: access.isStillGood,
    });
  });
  return router;
}

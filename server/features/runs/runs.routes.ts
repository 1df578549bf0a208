import { Router } from 'express';
import { z } from 'zod';
import { rowId } from '../../../shared/schemas/paging.ts';
import { runsQuery, solvesQuery, startRunBody } from '../../../shared/schemas/runs.ts';
import { stripsQuery } from '../../../shared/schemas/strips.ts';
import { sendEvents } from '../../http/event-stream.ts';
import { parseBody, parseRequest } from '../../http/parse-request.ts';
import { actorOf } from '../../http/session.ts';
import type { EventBus } from '../../jobs/event-bus.ts';
import type { RunsService } from './runs.service.ts';
import type { SolvesService } from './solves.service.ts';
import type { StripsService } from './strips.service.ts';

const byId = z.object({ run: rowId });
const bySolve = z.object({ solve: rowId });

export function runsRoutes(
  runs: RunsService,
  solves: SolvesService,
  strips: StripsService,
  bus: EventBus,
): Router {
  const router = Router();
  router.get('/runs', (request, response) => {
    response.json(runs.list(parseRequest(runsQuery, request.query, 'query')));
  });
  router.post('/runs', (request, response) => {
    const run = runs.start(actorOf(response), parseBody(startRunBody, request));
    response.status(201).location(`/api/runs/${run.id}`).json(run);
  });
  router.get('/runs/:run', (request, response) => {
    response.json(runs.getDetail(parseRequest(byId, request.params, 'address').run));
  });
  router.post('/runs/:run/cancel', (request, response) => {
    const { run } = parseRequest(byId, request.params, 'address');
    response.json(runs.cancel(actorOf(response), run));
  });
  router.post('/runs/:run/again', (request, response) => {
    const { run } = parseRequest(byId, request.params, 'address');
    const next = runs.again(actorOf(response), run);
    response.status(201).location(`/api/runs/${next.id}`).json(next);
  });
  router.get('/runs/:run/solves', (request, response) => {
    const { run } = parseRequest(byId, request.params, 'address');
    response.json(solves.list(run, parseRequest(solvesQuery, request.query, 'query')));
  });
  router.get('/strips', (request, response) => {
    const { solves: ids } = parseRequest(stripsQuery, request.query, 'query');
    response.json({ items: strips.read(ids) });
  });
  router.get('/solves/:solve', (request, response) => {
    response.json(solves.get(parseRequest(bySolve, request.params, 'address').solve));
  });
  router.get('/runs/:run/events', (request, response) => {
    const { run } = parseRequest(byId, request.params, 'address');
    const { library, status, phase, progress } = runs.get(run);
    sendEvents(response, {
      bus,
      first: { kind: 'run', run, library, status, phase, progress },
      filter: (event) => event.kind === 'run' && event.run === run,
    });
  });
  router.get('/events', (_request, response) => sendEvents(response, { bus }));
  return router;
}

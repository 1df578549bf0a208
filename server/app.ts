import express, { type Express, type RequestHandler, Router } from 'express';
import type { Logger } from 'pino';
import { authRoutes } from './auth/auth.routes.ts';
import type { Identity } from './auth/identity.ts';
import { accountRoutes } from './features/account/account.routes.ts';
import { allowancesRoutes } from './features/allowances/allowances.routes.ts';
import { auditRoutes } from './features/audit/audit.routes.ts';
import { buildSourcesRoutes } from './features/builds/build-sources.routes.ts';
import { buildsRoutes } from './features/builds/builds.routes.ts';
import { comparisonExtrasRoutes } from './features/comparisons/comparison-extras.routes.ts';
import { comparisonsRoutes } from './features/comparisons/comparisons.routes.ts';
import { invitationsRoutes } from './features/invitations/invitations.routes.ts';
import { kitsRoutes } from './features/kits/kits.routes.ts';
import { librariesRoutes } from './features/libraries/libraries.routes.ts';
import { trendsRoutes } from './features/libraries/trends.routes.ts';
import { membersRoutes } from './features/members/members.routes.ts';
import { demoRoutes } from './features/people/demo.routes.ts';
import { peopleRoutes } from './features/people/people.routes.ts';
import { referencesRoutes } from './features/references/references.routes.ts';
import { runsRoutes } from './features/runs/runs.routes.ts';
import type { Services } from './features/services.ts';
import { siteRoutes } from './features/site/site.routes.ts';
import { suitesRoutes } from './features/suites/suites.routes.ts';
import { tokensRoutes } from './features/tokens/tokens.routes.ts';
import { bodyLimit } from './http/body-limit.ts';
import { errorHandler, noSuchRoute } from './http/error-handler.ts';
import { hostCheck, originCheck } from './http/origin-check.ts';
import { declaredRoutes } from './http/permissions.ts';
import { requestId } from './http/request-id.ts';
import { securityHeaders } from './http/security-headers.ts';
import { session } from './http/session.ts';
import { keyOf } from './openapi/document.ts';
import { openapiRoutes } from './openapi/openapi.routes.ts';

export interface AppDeps {
  services: Services;
  /** Who somebody is and what they may do. */
  identity: Identity;
  logger: Logger;
  /** Host names, besides localhost and addresses in figures, under which the server is reached. */
  allowedHosts: readonly string[];
  /** Proxies in front whose word about the client's address is taken. */
  trustedProxies?: number;
  /** Where the pages of the local mail catcher are, where there is one. */
  mailCatcher?: () => string | null;
  isDevelopment?: boolean;
  /** Logs each request; left out in tests. */
  requestLog?: RequestHandler;
  /** Serves the client after the API. */
  site?: RequestHandler[];
}

const bodyBytes = 256 * 1024;

function apiRouter({ services, identity, mailCatcher = () => null }: AppDeps): Router {
  const api = Router();
  api.use((_request, response, next) => {
    response.set('Cache-Control', 'no-store');
    next();
  });
  api.use(originCheck);
  api.use(bodyLimit(bodyBytes));
  api.use(express.json({ limit: bodyBytes, strict: true, type: ['application/json'] }));
  api.use(session(identity.identify));
  api.use(siteRoutes(identity, services, mailCatcher));
  api.use(authRoutes(identity, services));
  api.use(accountRoutes(identity, services));
  api.use(demoRoutes(identity, services.people));
  api.use(peopleRoutes(services.people));
  api.use(membersRoutes(services.members));
  api.use(invitationsRoutes(services.invitations));
  api.use(tokensRoutes(services.tokens));
  api.use(librariesRoutes(services.libraries, services.solvers));
  api.use(buildsRoutes(services.builds));
  api.use(buildSourcesRoutes(services.buildPreviews, services.buildLogs, services.bus));
  api.use(suitesRoutes(services.suites));
  api.use(allowancesRoutes(services.allowances));
  api.use(runsRoutes(services.runs, services.solves, services.strips, services.bus));
  api.use(referencesRoutes(services.references));
  api.use(comparisonsRoutes(services.comparisons));
  api.use(comparisonExtrasRoutes(services.exports, services.codeDiffs, services.profiles));
  api.use(trendsRoutes(services.trends));
  api.use(kitsRoutes(services.kits));
  api.use(auditRoutes(services.audit));
  const actions = () => new Map(declaredRoutes(api).map((route) => [keyOf(route), route.action]));
  api.use(openapiRoutes(services.environment.tallyroot, actions));
  declaredRoutes(api); // throws where a route lets anyone in by oversight
  api.use(noSuchRoute);
  return api;
}

/** The whole application, not listening. */
export function createApp(deps: AppDeps): Express {
  const app = express();
  app.disable('x-powered-by');
  // Our own tags on what is immutable; a hash over every other body is work for nothing.
  app.set('etag', false);
  app.set('query parser', 'simple');
  app.set('trust proxy', deps.trustedProxies ?? 0);
  app.use(requestId);
  if (deps.requestLog) app.use(deps.requestLog);
  app.use(securityHeaders({ isDevelopment: deps.isDevelopment ?? false }));
  app.use(hostCheck(deps.allowedHosts));
  app.use('/api', apiRouter(deps));
  for (const handler of deps.site ?? []) app.use(handler);
  app.use(noSuchRoute);
  app.use(errorHandler(deps.logger));
  return app;
}

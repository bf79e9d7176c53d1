import { toNodeHandler } from 'better-auth/node';
import compression from 'compression';
import express, { type Express, Router } from 'express';
import helmet from 'helmet';
import { PHOTOGRAPH_TYPES } from '#shared/domain/photograph.ts';
import { AppError } from '#shared/errors.ts';
import { addAccountRoutes } from './account/account-routes.ts';
import { addCustomerSettingsRoutes } from './account/customer-settings-routes.ts';
import { addUnsubscribeRoutes } from './account/unsubscribe-routes.ts';
import { addAllocationRoutes } from './allocation/allocation-routes.ts';
import { addPlanJobRoutes } from './allocation/plan-job-routes.ts';
import { addShortfallRoutes } from './allocation/shortfall-routes.ts';
import { addCarcaseRoutes } from './carcases/carcase-routes.ts';
import { addCollectionRoutes } from './collections/collection-routes.ts';
import type { Deps } from './deps.ts';
import { addFeedbackRoutes } from './feedback/feedback-routes.ts';
import { addHerdRoutes } from './herd/herd-routes.ts';
import { addHealthRoutes } from './http/health-routes.ts';
import { clientAddress, oneLoopbackName, requestId, sameOrigin, sanePath } from './http/guards.ts';
import { COSTLY_POSTS, limitCostly } from './http/limits.ts';
import { pages } from './http/pages.ts';
import { answerErrors } from './http/problem.ts';
import type { Api } from './http/route.ts';
import { addMarginRoutes } from './margin/margin-routes.ts';
import { inboundMail } from './mail/inbound.ts';
import { addOfficeRoutes } from './office/office-routes.ts';
import { addDeliveryRoutes } from './delivery/delivery-routes.ts';
import { addOrderChangeRoutes } from './orders/order-change-routes.ts';
import { addOrderRoutes } from './orders/order-routes.ts';
import { addPackRoutes } from './packs/pack-routes.ts';
import { paymentWebhook } from './payments/webhook.ts';
import { addPhotographRoutes } from './photographs/photograph-routes.ts';
import { addReceiptRoutes } from './receipts/receipt-routes.ts';
import { addPromoRoutes } from './promo/promo-routes.ts';
import { addShopRoutes } from './shop/shop-routes.ts';
import { addSpecificationRoutes } from './specifications/specification-routes.ts';
import { addStandingRoutes } from './standing-orders/standing-routes.ts';
import { addTradeRoutes } from './trade/trade-routes.ts';
import { addWaitingRoutes } from './waiting-list/waiting-routes.ts';

export type App = { express: Express; api: Api };

/** `webRoot` is the folder that holds `dist` and `fonts`; without it only the API is served, as the tests of the API want. */
export function createApp(deps: Deps, webRoot: string | null): App {
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', 'loopback');
  app.use(requestId, sanePath);
  app.use(helmet({ contentSecurityPolicy: false, strictTransportSecurity: deps.origin.startsWith('https:') }));
  app.use(compression());

  app.use('/api', neverStored);
  app.post('/api/payments/webhook', express.raw({ type: '*/*', limit: '512kb' }), paymentWebhook(deps));
  app.post('/api/mail/inbound', express.raw({ type: '*/*', limit: '1mb' }), inboundMail(deps));
  app.all('/api/auth/{*any}', clientAddress, limitAuthBody, toNodeHandler(deps.auth));

  const api: Api = { router: Router(), endpoints: [], auth: deps.auth };
  for (const add of [
    addHealthRoutes,
    addShopRoutes,
    addOrderRoutes,
    addOrderChangeRoutes,
    addPromoRoutes,
    addDeliveryRoutes,
    addHerdRoutes,
    addCarcaseRoutes,
    addAllocationRoutes,
    addPlanJobRoutes,
    addShortfallRoutes,
    addMarginRoutes,
    addSpecificationRoutes,
    addTradeRoutes,
    addPackRoutes,
    addCollectionRoutes,
    addOfficeRoutes,
    addReceiptRoutes,
    addWaitingRoutes,
    addPhotographRoutes,
    addStandingRoutes,
    addFeedbackRoutes,
    addAccountRoutes,
    addUnsubscribeRoutes,
    addCustomerSettingsRoutes,
  ]) {
    add(api, deps);
  }
  app.post(COSTLY_POSTS, limitCostly(deps.costlyPostsPerMinute));
  app.use(sameOrigin, express.raw({ type: [...PHOTOGRAPH_TYPES], limit: '3mb' }));
  app.use(express.json({ limit: '256kb' }), api.router);
  app.use('/api', () => {
    throw new AppError('NOT_FOUND', 'There is no such address in the API.');
  });
  if (webRoot) app.use(oneLoopbackName(deps.origin), pages(webRoot, deps.payments.scriptUrl));
  app.use(answerErrors);
  return { express: app, api };
}

/** Stock moves by the second and orders are private: no answer of the API is kept by anybody on the way. */
const neverStored: express.RequestHandler = (_request, response, next) => {
  response.setHeader('Cache-Control', 'no-store');
  next();
};

/** better-auth reads bodies without a bound of its own. */
const limitAuthBody: express.RequestHandler = (request, _response, next) => {
  const length = Number(request.headers['content-length'] ?? 0);
  if (length > 16_384 || (request.headers['transfer-encoding'] && request.method !== 'GET')) {
    throw new AppError('TOO_LARGE', 'This is more than can be sent at once. Nothing was saved.');
  }
  next();
};

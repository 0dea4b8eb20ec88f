import { accountRoutes } from './account-routes.ts';
import { bandFitRoutes } from './band-fit.ts';
import { chargeTransferRoutes } from './charge-transfer.ts';
import { complexRoutes } from './complex-routes.ts';
import { deriveRoutes } from './derive.ts';
import { grantRoutes } from './grant-routes.ts';
import { levelFitRoutes } from './level-fits.ts';
import { ligandFieldRoutes } from './ligand-field.ts';
import { mergeRoutes } from './merge-routes.ts';
import { oversightRoutes } from './oversight-routes.ts';
import { peopleRoutes } from './people-routes.ts';
import { secondFactorRoutes } from './second-factor-routes.ts';
import { sharingRoutes } from './sharing-routes.ts';
import { spectrumRoutes } from './spectrum-routes.ts';
import { symmetryRoutes } from './symmetry.ts';

/**
 * Every endpoint of the program: who may call it, what enters and what leaves. Requests are checked by it, the OpenAPI
 * document is made from it, and the access matrix test asks for a row for each of its entries.
 */
export const routes = {
  ...deriveRoutes,
  ...symmetryRoutes,
  ...ligandFieldRoutes,
  ...levelFitRoutes,
  ...chargeTransferRoutes,
  ...bandFitRoutes,
  ...complexRoutes,
  ...mergeRoutes,
  ...spectrumRoutes,
  ...sharingRoutes,
  ...grantRoutes,
  ...peopleRoutes,
  ...accountRoutes,
  ...secondFactorRoutes,
  ...oversightRoutes,
};

export type RouteName = keyof typeof routes;

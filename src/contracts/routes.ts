import { complexRoutes } from './complex-routes.ts';
import { deriveRoutes } from './derive.ts';
import { ligandFieldRoutes } from './ligand-field.ts';
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
  ...complexRoutes,
  ...spectrumRoutes,
  ...sharingRoutes,
};

export type RouteName = keyof typeof routes;

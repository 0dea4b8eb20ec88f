import { routes } from '../contracts/routes.ts';

const served = Object.values(routes).map(({ method, path }) => ({
  method,
  pattern: new RegExp(`^${path.replaceAll('.', '\\.').replace(/\{\w+\}/g, '[^/]+')}$`),
}));

/** Methods that the route table serves at a path; none for a path that it does not know. */
export const servedMethods = (path: string): string[] =>
  served.filter(({ pattern }) => pattern.test(path)).map(({ method }) => method);

import { routes } from '#src/contracts/routes.ts';
import { seeBundle } from '#src/server/access/sharing.ts';
import { bundleFile } from '#src/server/bundles/file.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const GET = endpoint(routes.readBundleFile, {
  sight: ({ asker, params }) => seeBundle(asker, params.id!),
  act: ({ access, context }) => bundleFile(access, context.request),
});

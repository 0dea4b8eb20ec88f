import { routes } from '#src/contracts/routes.ts';
import { orderBundle, requireContent, requireDownload } from '#src/server/bundles/order.ts';
import { Answer, endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.createBundle, {
  sight: ({ asker }) => requireDownload(asker),
  judge: ({ asker, body }) => requireContent(asker, body),
  act: async ({ asker, body }) => {
    const bundle = await orderBundle(asker, body);
    return new Answer(bundle, { headers: { location: `/api/bundles/${bundle.id}` } });
  },
});

import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { openApiDocument } from '#src/server/openapi.ts';

let made: ReturnType<typeof openApiDocument> | undefined;

export const GET = endpoint(routes.openApi, {
  act: () => {
    made ??= openApiDocument();
    return made;
  },
});

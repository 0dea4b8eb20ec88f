import { doubleTable, findGroup } from '#src/chem/symmetry/index.ts';
import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { HttpError } from '#src/server/http.ts';

export const GET = endpoint(routes.readGroup, {
  sight: ({ params }) => {
    const group = findGroup(params.symbol ?? '');
    if (!group) throw new HttpError(404, 'No point group has this symbol; /api/symmetry/groups lists them');
    return group;
  },
  act: ({ access }) => ({ ...access, double: doubleTable(access.symbol) }),
});

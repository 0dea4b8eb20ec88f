import { chargeTransfer } from '#src/chem/charge-transfer/index.ts';
import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';

export const POST = endpoint(routes.deriveChargeTransfer, { act: ({ body }) => chargeTransfer(body) });

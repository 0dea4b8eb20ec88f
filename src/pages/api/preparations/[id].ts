import { routes } from '#src/contracts/routes.ts';
import { mayChangePreparation, type PreparationAccess, seePreparation } from '#src/server/access/records.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { preparationRecords } from '#src/server/preparations/record.ts';
import { changePreparation, deletePreparation } from '#src/server/preparations/write.ts';

const represent = async ({ asker, preparation }: PreparationAccess) =>
  (await preparationRecords(asker, [preparation]))[0];

export const GET = endpoint(routes.readPreparation, {
  sight: ({ asker, params }) => seePreparation(asker, params.id ?? ''),
  act: ({ access }) => represent(access),
});

export const PATCH = endpoint(routes.changePreparation, {
  sight: ({ asker, params }) => mayChangePreparation(asker, params.id ?? ''),
  represent,
  act: async ({ asker, access, body }) => {
    await changePreparation(access, body);
    return represent(await seePreparation(asker, access.preparation.id));
  },
});

export const DELETE = endpoint(routes.deletePreparation, {
  sight: ({ asker, params }) => mayChangePreparation(asker, params.id ?? ''),
  represent,
  act: ({ access }) => deletePreparation(access),
});

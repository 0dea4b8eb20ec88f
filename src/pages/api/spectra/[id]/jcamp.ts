import { routes } from '#src/contracts/routes.ts';
import { mayTakeSpectrum } from '#src/server/access/records.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { jcampFile } from '#src/server/spectra/download.ts';

export const GET = endpoint(routes.readSpectrumJcamp, {
  sight: ({ asker, params }) => mayTakeSpectrum(asker, params.id!),
  act: ({ access }) => jcampFile(access),
});

import { routes } from '#src/contracts/routes.ts';
import { mayTakeSpectrum } from '#src/server/access/records.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { originalFile } from '#src/server/spectra/download.ts';

export const GET = endpoint(routes.readSpectrumFile, {
  sight: ({ asker, params }) => mayTakeSpectrum(asker, params.id!),
  act: ({ access }) => originalFile(access),
});

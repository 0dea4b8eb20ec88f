import { routes } from '#src/contracts/routes.ts';
import { PreviewOptions } from '#src/contracts/spectra.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { readUpload } from '#src/server/spectra/multipart.ts';
import { previewFile } from '#src/server/spectra/preview.ts';

export const POST = endpoint(routes.deriveSpectrum, {
  act: async ({ context }) => {
    const { bytes, told } = await readUpload(context.request, 'options');
    return previewFile(bytes, PreviewOptions.parse(told ?? {}), context.request.signal);
  },
});

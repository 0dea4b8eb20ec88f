import type { BundleRecord } from '../../contracts/sharing.ts';

/** Whether there is still something to wait for. */
export const isUnderWay = ({ state }: Pick<BundleRecord, 'state'>): boolean =>
  state === 'queued' || state === 'running';

/** A size as people read it, in decimal steps (SI prefixes): 4.7 MB. */
export function readSize(bytes: number): string {
  const units = ['bytes', 'kB', 'MB', 'GB', 'TB'];
  let [value, step] = [bytes, 0];
  while (value >= 999.5 && step < units.length - 1) [value, step] = [value / 1000, step + 1];
  return `${step === 0 || value >= 99.5 ? Math.round(value) : value.toPrecision(2)} ${units[step]}`;
}

/** The command that checks a downloaded file; two spaces between sum and name, as sha256sum reads it. */
export const checkCommand = (sha256: string, fileName: string): string =>
  `echo "${sha256}  ${fileName}" | sha256sum -c`;

/** The name under which a browser will save a file: the one in Content-Disposition (RFC 6266), its UTF-8 form first. */
export function fileNameOf(contentDisposition: string | null): string | null {
  const encoded = /filename\*=UTF-8''([^;]+)/i.exec(contentDisposition ?? '')?.[1];
  if (encoded) return decodeURIComponent(encoded.trim());
  return /filename="([^"]+)"/i.exec(contentDisposition ?? '')?.[1] ?? null;
}

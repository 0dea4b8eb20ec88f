/** Files as instruments write them, made here: the curves are invented, of no substance. */

/** Points that the files below hold: two invented bands over 380–800 nm, absorbance to three decimals. */
export function inventedCurve(step = 5): { x: number[]; y: number[] } {
  const x = Array.from({ length: Math.floor(420 / step) + 1 }, (_, i) => 380 + i * step);
  const gaussian = (nm: number, centre: number, width: number) => Math.exp(-(((1e7 / nm - centre) / width) ** 2));
  const y = x.map(
    (nm) => Math.round(1000 * (0.62 * gaussian(nm, 14_000, 1400) + 0.9 * gaussian(nm, 25_000, 1500))) / 1000,
  );
  return { x, y };
}

const form = (value: number, [zero, plus, minus]: [string, string, string]): string => {
  const digits = String(Math.abs(value));
  const first = Number(digits[0]);
  return (first === 0 ? zero : (value < 0 ? minus : plus)[first - 1]) + digits.slice(1);
};
const squeezed = (value: number) => form(value, ['@', 'ABCDEFGHI', 'abcdefghi']);
const difference = (value: number) => form(value, ['%', 'JKLMNOPQR', 'jklmnopqr']);
const repeated = (count: number) => form(count, ['', 'STUVWXYZs', '']);

/** JCAMP-DX in DIFDUP form, with the check ordinate at the head of each line (McDonald & Wilks 1988, from memory). */
export function difdup({ x, y }: { x: number[]; y: number[] }, extra: string[] = []): string {
  const ordinates = y.map((value) => Math.round(value * 1000));
  const lines: string[] = [];
  const perLine = 12;
  for (let from = 0; from < ordinates.length - 1; from += perLine) {
    const steps = ordinates.slice(from + 1, from + 1 + perLine).map((value, i) => value - ordinates[from + i]!);
    let line = `${x[from]}${squeezed(ordinates[from]!)}`;
    for (let i = 0; i < steps.length; ) {
      let run = 1;
      while (steps[i + run] === steps[i]) run++;
      line += difference(steps[i]!) + (run > 1 ? repeated(run) : '');
      i += run;
    }
    lines.push(line);
  }
  lines.push(`${x.at(-1)}${squeezed(ordinates.at(-1)!)}`);
  return [
    '##TITLE= Invented green solution',
    '##JCAMP-DX= 4.24',
    '##DATA TYPE= UV/VIS SPECTRUM',
    '##ORIGIN= a test',
    '##OWNER= a test',
    '##XUNITS= NANOMETERS',
    '##YUNITS= ABSORBANCE',
    '##XFACTOR= 1',
    '##YFACTOR= 0.001',
    `##FIRSTX= ${x[0]}`,
    `##LASTX= ${x.at(-1)}`,
    `##NPOINTS= ${x.length}`,
    `##FIRSTY= ${y[0]}`,
    ...extra,
    '##XYDATA= (X++(Y..Y))',
    ...lines,
    '##END=',
    '',
  ].join('\r\n');
}

/** An export with decimal commas and without units; the second value is missing. */
export const decimalCommas = [
  'Probe 7',
  '400,0;0,512',
  '410,0;',
  '420,0;0,498',
  '430,0;0,455',
  '440,0;0,402',
  '450,0;0,351',
  '',
].join('\r\n');

export const formOf = (
  file: string | Uint8Array,
  json?: unknown,
  { part = 'metadata', name = 'curve.jdx' } = {},
): FormData => {
  const form = new FormData();
  form.append('file', new Blob([file as BlobPart]), name);
  if (json !== undefined) form.append(part, typeof json === 'string' ? json : JSON.stringify(json));
  return form;
};

/** Start the worker thread that reads files, so that no test waits for it. */
export async function warmReader(): Promise<void> {
  const { readBlocks } = await import('#src/server/spectra/read-curve.ts');
  await readBlocks(new TextEncoder().encode(difdup(inventedCurve())), {});
}

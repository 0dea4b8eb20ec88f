// Two files of one invented spectrum, as instruments write them.

const WIDTH = 3600;
const gaussian = (wavenumber: number, centre: number) => Math.exp(-4 * Math.LN2 * ((wavenumber - centre) / WIDTH) ** 2);

/** Absorbance of a chromium(III) tris-chelate at 5 mmol dm⁻³ in 1 cm: bands at 570 and 420 nm. */
const absorbance = (nm: number) => 0.375 * gaussian(1e7 / nm, 17_540) + 0.475 * gaussian(1e7 / nm, 23_810);

/** DIF form of JCAMP-DX: each ordinate as its difference from the one before (McDonald & Wilks 1988, 5.9). */
function dif(value: number): string {
  if (value === 0) return '%';
  const digits = String(Math.abs(value));
  const first = (value > 0 ? 'JKLMNOPQR' : 'jklmnopqr')[Number(digits[0]) - 1];
  return first + digits.slice(1);
}

function sqz(value: number): string {
  const digits = String(Math.abs(value));
  return (value < 0 ? ' abcdefghi' : '@ABCDEFGHI')[Number(digits[0])] + digits.slice(1);
}

/** A JCAMP-DX file in DIF form, ten points a line, with its check ordinates. */
export function jcampFile(): string {
  const ordinates = Array.from({ length: 401 }, (_, i) => Math.round(absorbance(350 + i) * 1e5));
  const lines: string[] = [];
  for (let at = 0; at < ordinates.length; at += 10) {
    const end = Math.min(at + 11, ordinates.length);
    // The last ordinate of a line stands again as the first of the next.
    const differences = ordinates.slice(at + 1, end).map((value, i) => dif(value - ordinates[at + i]!));
    lines.push(`${350 + at}${sqz(ordinates[at]!)}${differences.join('')}`);
  }
  return [
    '##TITLE= Cr-ox, invented for a test',
    '##JCAMP-DX= 5.01',
    '##DATA TYPE= UV/VIS SPECTRUM',
    '##ORIGIN= North Quay Lab',
    '##OWNER= CC0-1.0',
    '##XUNITS= NANOMETERS',
    '##YUNITS= ABSORBANCE',
    '##FIRSTX= 350',
    '##LASTX= 750',
    '##NPOINTS= 401',
    '##XFACTOR= 1',
    '##YFACTOR= 0.00001',
    '##XYDATA= (X++(Y..Y))',
    ...lines,
    '##END=',
    '',
  ].join('\r\n');
}

/** A text export with semicolons and decimal commas. */
export function decimalCommaFile(): string {
  const rows = Array.from({ length: 201 }, (_, i) => 350 + 2 * i).map(
    (nm) => `${nm},0;${(absorbance(nm) * 1.01).toFixed(5).replace('.', ',')}`,
  );
  return `Probe;Cr-ox 2\r\nWellenlänge (nm);Abs\r\n${rows.join('\r\n')}\r\n`;
}

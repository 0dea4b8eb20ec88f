import { expect, test } from 'vitest';
import { DomainError } from '../../../../src/chem/errors.ts';
import { readSpectrumFile, writeJcamp } from '../../../../src/chem/spectra/index.ts';
import { jcamp } from './bytes.ts';
import { random } from './random.ts';

const x = Array.from({ length: 120 }, (_, i) => 800 - i * 2);
const y = x.map((nm) => Math.exp(-(((nm - 650) / 60) ** 2)));
const HEALTHY = [
  writeJcamp({ title: 'healthy', xUnit: 'nm', yUnit: 'absorbance', x, y }),
  jcamp('400E0%UJ2T%p7\n435c'),
  `##TITLE= set\n##DATA TYPE= LINK\n##BLOCKS= 2\n${jcamp('400E0%%%J2J2%p7\n435c').repeat(2)}##END=\n`,
  jcamp('(17400, 75, <4T2g>)\n(24500, 60, <4T1g>)', { NPOINTS: '2', FIRSTY: null }, 'PEAK ASSIGNMENTS= (XYA)'),
  `Sample;invented\nWavelength (nm);Abs\n${x.map((nm, i) => `${nm};${y[i]!.toFixed(4).replace('.', ',')}`).join('\n')}\n`,
  `nm,A,B\n${x.map((nm, i) => `${nm},${y[i]},${2 * y[i]!}`).join('\r\n')}`,
  `# comment\n${x.map((nm, i) => `  ${nm}   ${y[i]!.toExponential(3)}`).join('\n')}`,
].map((text) => new TextEncoder().encode(text));
const SIGNS = new TextEncoder().encode('##=$;,.\t\n\r ?+-0123456789EeJjSsZ%@()<>"\0');

/** A few bytes changed, dropped, doubled or moved; now and then the end cut off. */
function damaged(bytes: Uint8Array, next: () => number): Uint8Array {
  let result = Array.from(bytes);
  const at = (): number => Math.floor(next() * result.length);
  for (let change = 0; change <= Math.floor(next() * 6); change++) {
    const kind = Math.floor(next() * 6);
    if (kind === 0) result[at()] = SIGNS[Math.floor(next() * SIGNS.length)]!;
    else if (kind === 1) result.splice(at(), 1 + Math.floor(next() * 20));
    else if (kind === 2) result.splice(at(), 0, SIGNS[Math.floor(next() * SIGNS.length)]!);
    else if (kind === 3) result = [...result, ...result.slice(at(), at() + 200)];
    else if (kind === 4) result[at()] = Math.floor(next() * 256);
    else if (next() < 0.3) result = result.slice(0, at());
  }
  return Uint8Array.from(result);
}

const FILES = process.env.ZAFFRE_LONG === '1' ? 5000 : 300;

test(`${FILES} damaged files are read or refused in words, and none hangs`, { timeout: 300_000 }, () => {
  let [read, refused] = [0, 0];
  for (let seed = 1; seed <= FILES; seed++) {
    const next = random(seed);
    const file = damaged(HEALTHY[seed % HEALTHY.length]!, next);
    try {
      for (const block of readSpectrumFile(file)) {
        expect(block.x.length, `seed ${seed}`).toBe(block.y.length);
        expect(block.points, `seed ${seed}`).toBe(block.x.length);
        expect(block.x.every(Number.isFinite), `seed ${seed}`).toBe(true);
      }
      read++;
    } catch (error) {
      if (!(error instanceof DomainError)) throw new Error(`seed ${seed}`, { cause: error });
      expect(error.message.length, `seed ${seed}`).toBeGreaterThan(10);
      refused++;
    }
  }
  expect(read).toBeGreaterThan(FILES / 20);
  expect(refused).toBeGreaterThan(FILES / 20);
});

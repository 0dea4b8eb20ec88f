import { expect, test } from 'vitest';
import { bandSentence } from '#src/components/spectra/bands/band-sentence.ts';

const water = { solvent: [{ name: 'water', volumeFraction: 1 }], temperature: 298 };

// The form of the sentence is common practice in papers of the field.
test('the sentence gives wavelength, ε, shoulders, solvent and temperature, longest wavelength last', () => {
  const bands = [
    { wavenumber: 21550, epsilon: 40.06, shoulder: false },
    { wavenumber: 28500, epsilon: 33.4, shoulder: true },
  ];
  expect(bandSentence(bands, water)).toBe('λmax/nm (ε/dm³ mol⁻¹ cm⁻¹): 351sh (33.4), 464 (40.1); water, 298 K');
});

test('without ε the wavelengths stand alone; without conditions nothing follows them', () => {
  const bands = [{ wavenumber: 20000, epsilon: null, shoulder: false }];
  expect(bandSentence(bands, { solvent: [], temperature: null })).toBe('λmax/nm: 500');
});

test('a band without ε among others stands with its wavelength alone; a mixture names its shares', () => {
  const bands = [
    { wavenumber: 20000, epsilon: null, shoulder: false },
    { wavenumber: 40000, epsilon: 12345, shoulder: false },
  ];
  const mixed = {
    solvent: [
      { name: 'ethanol', volumeFraction: 0.8 },
      { name: 'methanol', volumeFraction: 0.2 },
    ],
    temperature: 77,
  };
  expect(bandSentence(bands, mixed)).toBe(
    'λmax/nm (ε/dm³ mol⁻¹ cm⁻¹): 250 (12300), 500; ethanol 80 %, methanol 20 %, 77 K',
  );
});

test('a fitted position comes with its standard uncertainty, turned into nm', () => {
  // 40 cm⁻¹ at 21 550 cm⁻¹ are 40 · 464.04² / 1e7 = 0.861 nm
  const fitted = { wavenumber: 21_550, epsilon: 40.1, shoulder: false, found: 'fitted' as const, uncertainty: 40 };
  const head = 'λmax/nm (ε/dm³ mol⁻¹ cm⁻¹)';
  expect(bandSentence([fitted], water)).toBe(`${head}: 464.04 ± 0.86 (40.1); water, 298 K`);
  expect(bandSentence([{ ...fitted, found: 'picked' }], water)).toBe(`${head}: 464 (40.1); water, 298 K`);
});

test('no bands, no sentence', () => {
  expect(bandSentence([], water)).toBeNull();
});

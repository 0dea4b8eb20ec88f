import { describe, expect, test } from 'vitest';
import { addCompositions, elements, findElement, hillFormula, isDBlock, molarMass } from '#src/chem/elements.ts';

describe('elements', () => {
  test('118 in order of atomic number, symbols once each', () => {
    expect(elements.map((e) => e.number)).toEqual(Array.from({ length: 118 }, (_, i) => i + 1));
    expect(new Set(elements.map((e) => e.symbol)).size).toBe(118);
    expect(elements.every((e) => e.weight > 0)).toBe(true);
  });

  // Red Book 2005, periodic table; La and Lu are kept with the f block here.
  test('the d block is groups 3 to 12, 29 stable and 10 late elements less La, Ac, Lu and Lr', () => {
    const d = elements.filter((e) => e.block === 'd');
    expect(
      d
        .filter((e) => e.period === 4)
        .map((e) => e.symbol)
        .join(' '),
    ).toBe('Sc Ti V Cr Mn Fe Co Ni Cu Zn');
    expect(d.every((e) => e.group !== null && e.group >= 3 && e.group <= 12)).toBe(true);
    expect(isDBlock('La')).toBe(false);
    expect(findElement('La')?.block).toBe('f');
    expect(findElement('co')).toBeNull();
  });

  // CIAAW 2021 abridged weights by hand: 2 × 1.008 + 15.999.
  test('mass of water', () => expect(molarMass({ H: 2, O: 1 })).toBeCloseTo(18.015, 3));

  test('a symbol that is no element has no mass', () => expect(molarMass({ Xq: 1 })).toBeNaN());

  // E. A. Hill's order: carbon, hydrogen, the rest; all by alphabet without carbon.
  test('Hill order', () => {
    expect(hillFormula({ O: 3, Cr: 1, C: 2, H: 6 })).toBe('C2H6CrO3');
    expect(hillFormula({ O: 4, Mn: 1, K: 1 })).toBe('KMnO4');
    expect(hillFormula({ H: 1, Cl: 1 })).toBe('ClH');
    expect(hillFormula({})).toBe('');
  });

  test('compositions add up with their factors', () => {
    expect(
      addCompositions([
        { composition: { H: 2, O: 1 }, count: 0.5 },
        { composition: { O: 1 }, count: 2 },
      ]),
    ).toEqual({ H: 1, O: 2.5 });
  });
});

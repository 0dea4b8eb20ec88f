import { describe, expect, test } from 'vitest';
import { molarMass } from '#src/chem/elements.ts';
import { findLigand, indexLigands, ligand, ligands, nearestLigand } from '#src/chem/ligands/index.ts';

describe('ligand library', () => {
  test('abbreviations are unique, and no synonym is another ligand’s abbreviation', () => {
    const abbreviations = ligands.map((l) => l.abbreviation);
    expect(new Set(abbreviations).size).toBe(ligands.length);
    expect(ligands.length).toBeGreaterThan(90);
    for (const entry of ligands)
      for (const s of entry.synonyms) expect(abbreviations, `${entry.abbreviation}: ${s}`).not.toContain(s);
  });

  test('no spelling is claimed by two ligands', () => {
    const owners = new Map<string, string>();
    for (const entry of ligands) {
      for (const s of [entry.abbreviation, ...entry.synonyms]) {
        expect(owners.get(s) ?? entry.abbreviation, s).toBe(entry.abbreviation);
        owners.set(s, entry.abbreviation);
      }
    }
  });

  test.each(ligands.map((l) => [l.abbreviation, l] as const))('%s is consistent', (_, l) => {
    expect(molarMass(l.composition)).toBeGreaterThan(0);
    expect(l.bite.every(([i, j]) => i !== j && i < l.donors.length && j < l.donors.length)).toBe(true);
    for (const d of l.donors)
      expect(l.composition[d], `donor ${d}`).toBeGreaterThanOrEqual(l.donors.filter((x) => x === d).length);
    expect(l.denticities).toContain(l.denticity);
    if (l.hapticity !== null) expect(l.denticity).toBe(1);
  });

  test.each([
    ['ox', 'C2O4'],
    ['H2O', 'OH2'],
    ['MeCN', 'NCMe'],
    ['MeCN', 'CH3CN'],
    ['tpy', 'terpy'],
    ['Cp', 'cp'],
    ['Cp', 'C5H5'],
    ['pyz', 'pz'],
    ['bpy', 'bipy'],
    ['bpy', 'BPY'],
    ['ONO', 'ONO'],
    ['NCS', 'NCS'],
    ['SCN', 'SCN'],
    ['Hdmg', 'dmgH'],
    ['TPP', 'tpp'],
  ])('%s is found as %s', (abbreviation, spelling) => expect(findLigand(spelling)?.abbreviation).toBe(abbreviation));

  test('case counts in formulae, and a formula of several isomers is none of them', () => {
    expect(findLigand('co')).toBeNull();
    expect(findLigand('Co')).toBeNull();
    expect(findLigand('C10H8N2')).toBeNull();
  });

  test('a near miss is proposed, two letters and noise are not', () => {
    expect(nearestLigand('byp')).toBe('bpy');
    expect(nearestLigand('phenn')).toBe('phen');
    expect(nearestLigand('Xq')).toBeNull();
    expect(nearestLigand('zzzzzzzz')).toBeNull();
  });

  test('a lab’s own ligand takes its place before the library', () => {
    const own = ligand('bpy', 'C10H8N2', 0, 'N N', 'ours', 'c1ccnc(c1)-c1ccccn1', 'acceptor');
    expect(findLigand('bpy', indexLigands([own, ...ligands]))?.name).toBe('ours');
  });

  test('an entry whose formula is no composition is refused', () => {
    expect(() => ligand('zz', 'Zz2', 0, 'Zz', '', '', 'none')).toThrow(/no composition/);
  });
});

import { describe, expect, test } from 'vitest';
import { DomainError } from '#src/chem/errors.ts';
import {
  countIsomers,
  enumerateIsomers,
  geometries,
  type IsomerRequest,
  isomerIndex,
  type LigandSlot,
} from '#src/chem/geometry/index.ts';

/** Ligands in shorthand: `A2 B2` monodentates, `(AA)2` chelates by their chain of one-letter donors. */
function ligands(text: string): LigandSlot[] {
  return [...text.matchAll(/\(([A-Z]+)\)(\d*)|([A-Z])(\d*)/g)].map(([, chain, times, donor, count]) =>
    chain
      ? { label: chain, pattern: [...chain], count: Number(times || 1) }
      : { label: donor!, donors: 1, count: Number(count || 1) },
  );
}

const list = (geometry: string, text: string) => enumerateIsomers({ geometry, ligands: ligands(text) });

function refusal(request: IsomerRequest): DomainError {
  try {
    enumerateIsomers(request);
  } catch (error) {
    if (error instanceof DomainError) return error;
    throw error;
  }
  throw new Error('was not refused');
}

describe('published counts: stereoisomers, pairs of enantiomers', () => {
  /**
   * OC-6: J. C. Bailar, J. Chem. Educ. 34 (1957) 334, and the table of Miessler, Fischer and Tarr, Inorganic
   * Chemistry, 5th ed. (2014), ch. 9; both from memory.
   */
  test.each([
    ['A6', 1, 0],
    ['A5 B', 1, 0],
    ['A4 B2', 2, 0],
    ['A4 B C', 2, 0],
    ['A3 B3', 2, 0],
    ['A3 B2 C', 3, 0],
    ['A3 B C D', 5, 1],
    ['A2 B2 C2', 6, 1],
    ['A2 B2 C D', 8, 2],
    ['A2 B C D E', 15, 6],
    ['A B C D E F', 30, 15],
    ['(AA)3', 2, 1],
    ['(AA)2 B2', 3, 1],
    ['(AA)2 (BB)', 2, 1],
    ['(AA) (BB) C2', 3, 1],
    ['(AA) B4', 1, 0],
    ['(AA) B3 C', 2, 0],
    ['(AA) B2 C2', 4, 1],
    ['(AA) B C D E', 12, 6],
    ['(AB)3', 4, 2],
    ['(AB)2 C2', 8, 3],
    ['(AB) C4', 1, 0],
  ])('OC-6 %s: %i, %i', (text, count, pairs) => {
    expect(list('OC-6', text)).toMatchObject({ count, enantiomericPairs: pairs });
  });

  /** Common practice: Huheey, Keiter and Keiter, Inorganic Chemistry, 4th ed., ch. 12; from memory. */
  test.each([
    ['SP-4', 'A2 B2', 2, 0],
    ['SP-4', 'A2 B C', 2, 0],
    ['SP-4', 'A B C D', 3, 0],
    ['SP-4', '(AB)2', 2, 0],
    ['SP-4', '(AA) B C', 1, 0],
    ['T-4', 'A B C D', 2, 1],
    ['T-4', 'A2 B C', 1, 0],
    ['T-4', '(AB)2', 2, 1],
  ])('%s %s: %i, %i', (geometry, text, count, pairs) => {
    expect(list(geometry, text)).toMatchObject({ count, enantiomericPairs: pairs });
  });

  /** All donors different: no rotation keeps anything, so the count is n! over the number of rotations. */
  test.each([
    ['TBPY-5', 'A B C D E', 120 / 6],
    ['SPY-5', 'A B C D E', 120 / 4],
    ['TPR-6', 'A B C D E F', 720 / 6],
    ['PBPY-7', 'A B C D E F G', 5040 / 10],
    ['CU-8', 'A B C D E F G H', 40320 / 24],
  ])('%s %s: %i, half of them pairs', (geometry, text, count) => {
    expect(list(geometry, text)).toMatchObject({ count, enantiomericPairs: count / 2 });
  });

  /** By hand: C facing D is one achiral form; else C faces A and D faces B, or the other way, each a pair. */
  test('OC-6 (AA) (BB) C D: 5, 2', () => {
    expect(list('OC-6', '(AA) (BB) C D')).toMatchObject({ count: 5, enantiomericPairs: 2 });
  });

  /** [Co(dien)2]3+: F. R. Keene and G. H. Searle, Inorg. Chem. 11 (1972) 148 (mer, s-fac, u-fac); from memory. */
  test('bis(tridentate): mer, sym-fac, and unsym-fac as a pair', () => {
    const { isomers } = enumerateIsomers({ geometry: 'OC-6', ligands: [{ label: 'dien', donors: 3, count: 2 }] });
    expect(isomers.map(({ descriptor, pointGroup }) => `${descriptor} ${pointGroup}`)).toEqual([
      'mer D2d',
      'sym-fac C2h',
      'unsym-fac C2',
      'unsym-fac C2',
    ]);
  });

  /** A. M. Sargeson and G. H. Searle, Inorg. Chem. 4 (1965) 45 on trien: trans, cis-α, cis-β; from memory. */
  test('linear tetradentate with two like ligands: trans, and pairs of cis-α and cis-β', () => {
    const { isomers } = list('OC-6', '(NNNN) X2');
    expect(isomers.map(({ descriptor, chirality, pointGroup }) => `${descriptor} ${chirality} ${pointGroup}`)).toEqual([
      'trans null C2v',
      'cis-α Λ C2',
      'cis-α Δ C2',
      'cis-β Λ C1',
      'cis-β Δ C1',
    ]);
  });
});

/** Ways of writing n as falling whole numbers. */
function partitions(n: number, most = n): number[][] {
  if (n === 0) return [[]];
  const heads = Array.from({ length: Math.min(n, most) }, (_, k) => k + 1);
  return heads.flatMap((head) => partitions(n - head, head).map((rest) => [head, ...rest]));
}

describe('orbits and Burnside agree', () => {
  const small = geometries.filter(({ coordinationNumber }) => coordinationNumber <= 6);
  test.each(small)('$symbol, every mixture of monodentates', ({ symbol, coordinationNumber }) => {
    for (const counts of partitions(coordinationNumber)) {
      const slots = counts.map((count, k): LigandSlot => ({ label: 'ABCDEF'[k]!, donors: 1, count }));
      const request = { geometry: symbol, ligands: slots };
      expect(enumerateIsomers(request).count, counts.join()).toBe(countIsomers(request));
    }
  });

  test.each([
    ['SAPR-8', '(AA)4'],
    ['DD-8', '(AA)4'],
    ['PBPY-7', '(AB)2 C3'],
    ['TPR-6', '(AB)3'],
    ['TPR-6', '(AA)3'],
    ['TBPY-5', '(AB)2 C'],
    ['SPY-5', '(AA) (BC) D'],
    ['OC-6', '(ABC) (DE) F'],
    ['OC-6', '(ABCDEF)'],
    ['TPRS-9', '(AA)4 B'],
    ['OCF-7', '(ABA)2 C'],
  ])('%s %s', (geometry, text) => {
    const request = { geometry, ligands: ligands(text) };
    expect(enumerateIsomers(request).count).toBe(countIsomers(request));
  });
});

describe('both groups, framework and donor set', () => {
  test.each([
    ['A2 (BB)2', 'trans', 'D2h', 'D4h'],
    ['A2 (BB)2', 'cis', 'C2', 'C2v'],
    ['(AA)3', null, 'D3', 'Oh'],
    ['(AB)3', 'fac', 'C3', 'C3v'],
    ['(AB)3', 'mer', 'C1', 'C2v'],
  ])('%s %s: %s and %s', (text, descriptor, pointGroup, donorSetGroup) => {
    const { isomers } = list('OC-6', text);
    expect(isomers.find((isomer) => isomer.descriptor === descriptor)).toMatchObject({ pointGroup, donorSetGroup });
  });

  test('a ring of four donors in a plane keeps D4h, an open chain does not', () => {
    const axial: LigandSlot = { label: 'Cl', donors: 1, count: 2 };
    const ring: LigandSlot = { label: 'N', donors: 4, planar: true, count: 1 };
    const open: LigandSlot = {
      ...ring,
      links: [
        [0, 1],
        [1, 2],
        [2, 3],
      ],
    };
    const groups = (ligand: LigandSlot) =>
      enumerateIsomers({ geometry: 'OC-6', ligands: [axial, ligand] }).isomers.map(({ pointGroup }) => pointGroup);
    expect(groups(ring)).toEqual(['D4h']);
    expect(groups(open)).toEqual(['C2v']);
  });
});

describe('names', () => {
  const names = (geometry: string, text: string) => list(geometry, text).isomers.map(({ descriptor }) => descriptor);

  test.each([
    ['OC-6', 'A6', [null]],
    ['OC-6', 'A4 B2', ['trans', 'cis']],
    ['OC-6', 'A4 B C', ['trans', 'cis']],
    ['OC-6', 'A2 B2 C2', ['all-trans', 'trans-A', 'trans-C', 'trans-B', 'all-cis', 'all-cis']],
    ['SP-4', 'A B C D', ['trans: A–B, C–D', 'trans: A–C, B–D', 'trans: A–D, B–C']],
    ['TBPY-5', 'A4 B', ['axial: A, B', 'axial: A, A']],
    ['SPY-5', 'A4 B', ['apical: B', 'apical: A']],
    ['TS-3', 'A2 B', ['stem: B', 'stem: A']],
    [
      'TPR-6',
      'A4 B2',
      [
        'pillars: A–A, A–A, B–B',
        'pillars: A–A, A–B, A–B; triangles: A A A and A B B',
        'pillars: A–A, A–B, A–B; triangles: A A B and A A B',
        'pillars: A–A, A–B, A–B; triangles: A A B and A A B',
      ],
    ],
    [
      'PBPY-7',
      'A5 B2',
      ['axial: B, B', 'axial: A, A; ring: A, A, A, B, B', 'axial: A, A; ring: A, A, B, A, B', 'axial: A, B'],
    ],
  ])('%s %s', (geometry, text, expected) => {
    expect(names(geometry, text)).toEqual(expected);
  });

  test('a name never stands for two forms', () => {
    for (const text of ['A2 B2 C D', 'A3 B2 C', '(ABC)2', '(ABA) C D E', '(ABBA) C D', '(AB)2 C D', 'A2 B C D E']) {
      const { isomers, enantiomericPairs } = list('OC-6', text);
      const distinct = new Set(isomers.map(({ descriptor }) => descriptor));
      expect(distinct.size, text).toBe(isomers.length - enantiomericPairs);
      expect(distinct, text).not.toContain(null);
    }
  });
});

describe('spans and links', () => {
  const tridentate = (span: LigandSlot['span']) =>
    enumerateIsomers({
      geometry: 'OC-6',
      ligands: [
        { label: 'A', donors: 3, span, count: 1 },
        { label: 'B', donors: 1, count: 3 },
      ],
    }).isomers.map(({ descriptor, pointGroup }) => `${descriptor} ${pointGroup}`);

  test('fac, mer and either', () => {
    expect(tridentate('fac')).toEqual(['null Cs']);
    expect(tridentate('mer')).toEqual(['null C2v']);
    expect(tridentate('either')).toEqual(['mer C2v', 'fac Cs']);
    expect(tridentate(undefined)).toEqual(tridentate('either'));
  });

  test('links may branch: edta has one form, a pair, whose group is C2', () => {
    const { isomers } = enumerateIsomers({
      geometry: 'OC-6',
      ligands: [
        {
          label: 'edta',
          pattern: ['O', 'O', 'N', 'N', 'O', 'O'],
          links: [
            [0, 2],
            [1, 2],
            [2, 3],
            [3, 4],
            [3, 5],
          ],
          count: 1,
        },
      ],
    });
    expect(isomers.map(({ chiral, pointGroup }) => [chiral, pointGroup])).toEqual([
      [true, 'C2'],
      [true, 'C2'],
    ]);
  });

  test('an unsymmetric bidentate without pattern has donors B and B′', () => {
    const slot: LigandSlot = { label: 'B', donors: 2, symmetric: false, count: 3 };
    const { count, isomers } = enumerateIsomers({ geometry: 'OC-6', ligands: [slot] });
    expect(count).toBe(4);
    expect([...isomers[0]!.sites].sort()).toEqual(['B', 'B', 'B', "B'", "B'", "B'"]);
  });

  test('slots of the same ligand are one kind', () => {
    const a: LigandSlot = { label: 'A', donors: 1, count: 2 };
    const b: LigandSlot = { label: 'B', donors: 1, count: 2 };
    expect(enumerateIsomers({ geometry: 'OC-6', ligands: [a, b, a] }).count).toBe(2);
  });

  test('a chelate that finds no edge has no isomer', () => {
    const slot: LigandSlot = { label: 'A', donors: 2, count: 1 };
    expect(enumerateIsomers({ geometry: 'L-2', ligands: [slot] })).toEqual({
      count: 0,
      enantiomericPairs: 0,
      isomers: [],
    });
  });

  test('each ligand owns its vertices, and chelates join vertices of one ligand', () => {
    for (const isomer of list('OC-6', '(AB)2 C D').isomers) {
      const sizes = [0, 1, 2, 3].map((owner) => isomer.ligandOfSite.filter((other) => other === owner).length);
      expect(sizes).toEqual([2, 2, 1, 1]);
      for (const [i, j] of isomer.chelates) expect(isomer.ligandOfSite[i]).toBe(isomer.ligandOfSite[j]);
    }
  });
});

describe('an isomer is found again from its sites', () => {
  const request = { geometry: 'OC-6', ligands: ligands('A2 (BB)2') };
  const isomers = enumerateIsomers(request);

  test('in any orientation', () => {
    expect(
      isomerIndex(
        request,
        isomers,
        ['B', 'B', 'A', 'A', 'B', 'B'],
        [
          [4, 0],
          [1, 5],
        ],
      ),
    ).toBe(0);
    isomers.isomers.forEach(({ sites, chelates }, n) => {
      expect(isomerIndex(request, isomers, sites, chelates)).toBe(n);
    });
  });

  test('but not where the donors alone leave the hand open, or nothing fits', () => {
    expect(isomerIndex(request, isomers, ['A', 'A', 'B', 'B', 'B', 'B'])).toBe(0);
    expect(isomerIndex(request, isomers, ['A', 'B', 'A', 'B', 'B', 'B'])).toBeNull();
    expect(isomerIndex(request, isomers, ['A', 'A', 'A', 'B', 'B', 'B'])).toBeNull();
  });
});

describe('refusals', () => {
  const one = (slot: LigandSlot, geometry = 'OC-6') => refusal({ geometry, ligands: [slot] });

  test('name the field and the reason', () => {
    expect(one({ label: 'A', count: 6 }, 'OC-9')).toMatchObject({ code: 'unsupported', field: 'geometry' });
    expect(refusal({ geometry: 'OC-6', ligands: [] })).toMatchObject({ code: 'empty', field: 'ligands' });
    expect(one({ label: '', count: 6 })).toMatchObject({ code: 'empty', field: 'ligands' });
    expect(one({ label: 'A', donors: 4, count: 2, span: 'fac' })).toMatchObject({ code: 'unsupported' });
  });

  test.each<[string, LigandSlot]>([
    ['too few donors', { label: 'A', count: 5 }],
    ['too many donors', { label: 'A', donors: 2, count: 4 }],
    ['half a ligand', { label: 'A', count: 1.5 }],
    ['no ligand', { label: 'A', count: 0 }],
    ['no donors', { label: 'A', donors: 0, count: 6 }],
    ['a pattern of another length', { label: 'A', donors: 2, pattern: ['N'], count: 3 }],
    ['a link to nowhere', { label: 'A', donors: 2, links: [[0, 2]], count: 3 }],
    ['a link to itself', { label: 'A', donors: 2, links: [[1, 1]], count: 3 }],
    ['donors left apart', { label: 'A', donors: 3, links: [[0, 1]], count: 2 }],
  ])('%s', (_, slot) => {
    expect(one(slot)).toMatchObject({ code: 'out-of-range', field: 'ligands' });
  });

  test('a search without end is not begun', () => {
    const many = (n: number) =>
      [...'ABCDEFGHI'].slice(0, n).map((label): LigandSlot => ({ label, donors: 1, count: 1 }));
    for (const [geometry, n] of [
      ['TPRS-9', 9],
      ['HBPY-9', 9],
      ['TPRS-8', 8],
    ] as const) {
      expect(refusal({ geometry, ligands: many(n) })).toMatchObject({ code: 'too-large', field: 'ligands' });
    }
  });
});

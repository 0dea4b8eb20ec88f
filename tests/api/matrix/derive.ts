import { type MatrixRow, statuses } from './fixture.ts';

const anybody = statuses({ others: 200 });

export const rows: Record<string, MatrixRow> = {
  deriveFormula: { send: () => ({ path: '/api/derive/formula', json: { formula: '[Co(NH3)6]3+' } }), expect: anybody },
  deriveIsomers: {
    send: () => ({
      path: '/api/derive/isomers',
      json: { geometry: 'SP-4', ligands: [{ label: 'A', donors: 1, count: 4 }] },
    }),
    expect: anybody,
  },
  deriveColour: {
    send: () => ({ path: '/api/derive/colour', json: { x: [12_000, 20_000, 28_000], epsilon: [1, 50, 1] } }),
    expect: anybody,
  },
  listGeometries: { send: () => ({ path: '/api/geometries' }), expect: anybody },
  listLigands: { send: () => ({ path: '/api/ligands' }), expect: anybody },
};

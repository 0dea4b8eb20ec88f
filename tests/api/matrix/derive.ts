import { type MatrixRow, statuses } from './fixture.ts';

/** 700 to 400 nm and beyond, in steps of 500 cm⁻¹. */
const wavenumbers = Array.from({ length: 35 }, (_, i) => 12_000 + 500 * i);
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
    send: () => ({
      path: '/api/derive/colour',
      json: { x: wavenumbers, epsilon: wavenumbers.map((x) => 50 * Math.exp(-(((x - 20_000) / 2500) ** 2))) },
    }),
    expect: anybody,
  },
  listGeometries: { send: () => ({ path: '/api/geometries' }), expect: anybody },
  listLigands: { send: () => ({ path: '/api/ligands' }), expect: anybody },
  listGroups: { send: () => ({ path: '/api/symmetry/groups' }), expect: anybody },
  readGroup: { send: () => ({ path: '/api/symmetry/groups/D4h' }), expect: anybody },
  deriveProduct: {
    send: () => ({ path: '/api/derive/product', json: { group: 'Oh', irreps: ['T2g', 'Eg'] } }),
    expect: anybody,
  },
  deriveDescent: {
    send: () => ({ path: '/api/derive/descent', json: { from: 'Oh', to: 'D4h', irreps: ['T2g'] } }),
    expect: anybody,
  },
  deriveSplitting: {
    send: () => ({ path: '/api/derive/splitting', json: { group: 'Oh', term: '3F' } }),
    expect: anybody,
  },
  deriveVibrations: {
    send: () => ({ path: '/api/derive/vibrations', json: { geometry: 'OC-6', sites: ['A', 'A', 'A', 'A', 'A', 'A'] } }),
    expect: anybody,
  },
  deriveSelection: {
    send: () => ({ path: '/api/derive/selection', json: { group: 'Oh', from: '2T2g', to: '2Eg' } }),
    expect: anybody,
  },
  deriveLevels: {
    send: () => ({
      path: '/api/derive/levels',
      json: { n: 3, field: { kind: 'cubic', geometry: 'OC-6', delta: 17_400 }, B: 725, C: 2900, zeta: 0 },
    }),
    expect: anybody,
  },
  deriveFit: {
    send: () => ({
      path: '/api/derive/fit',
      json: { n: 3, geometry: 'OC-6', bands: [{ wavenumber: 17_400, to: '4T2g' }, { wavenumber: 24_500 }] },
    }),
    expect: anybody,
  },
  deriveDiagram: {
    send: () => ({ path: '/api/derive/diagram', json: { n: 3, geometry: 'OC-6', ratioCB: 4.5, max: 40, points: 11 } }),
    expect: anybody,
  },
  deriveChargeTransfer: {
    send: () => ({
      path: '/api/derive/charge-transfer',
      json: { element: 'Cr', oxidationState: 3, geometry: 'OC-6', ligands: ['Cl', 'NH3'] },
    }),
    expect: anybody,
  },
  deriveBands: {
    send: () => ({
      path: '/api/derive/bands',
      json: {
        x: wavenumbers,
        y: wavenumbers.map((x) => 50 * Math.exp(-(((x - 20_000) / 2500) ** 2))),
        count: 1,
        edge: false,
      },
    }),
    expect: anybody,
  },
};

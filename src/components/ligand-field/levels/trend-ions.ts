import type { TrendGeometry } from './levels-address.ts';

type Ion = { element: string; oxidationState: number };
const ions = (...texts: string[]): Ion[] =>
  texts.map((text) => ({ element: text.replace(/\d/g, ''), oxidationState: Number(text.replace(/\D/g, '')) }));

/** Ions with tabulated optical electronegativities, that the trend compares. */
export const TREND_IONS: Record<TrendGeometry, Ion[]> = {
  'OC-6': ions('Cr3', 'Co3', 'Fe3', 'Rh3', 'Ir3', 'Ru3', 'Os3', 'Os4', 'Pt4', 'Ti4'),
  'T-4': ions('Co2', 'Ni2', 'Cu2', 'Fe3', 'V5', 'Cr6', 'Mn7'),
  'SP-4': ions('Pd2', 'Pt2', 'Cu2'),
};

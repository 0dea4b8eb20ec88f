import { renderToStaticMarkup } from 'react-dom/server';
import { expect, test } from 'vitest';
import { ComplexPage } from '#src/components/complexes/page/ComplexPage.tsx';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import type { BandRecord, SpectrumSummary } from '#src/contracts/spectra.ts';

const lab = { id: 'l1', name: 'North Quay' };
/** An invented record of a well-known ion. */
const complex = {
  accession: 'ZF048609-D',
  formula: '[Cr(NH3)6]3+',
  charge: 3,
  hill: 'CrH18N6',
  molarMass: 154.18,
  extent: 'discrete',
  centres: [
    {
      element: 'Cr',
      group: 6,
      oxidationState: { value: 3, nominal: false, alternatives: [] },
      dCount: 3,
      geometry: 'OC-6',
      geometryBasis: 'assumed',
      spinState: null,
      groundTerm: { label: '4A2g', group: 'Oh' },
    },
  ],
  ligands: [{ abbreviation: 'NH3', count: 6 }],
  isomer: { descriptor: null, chirality: null, sites: Array(6).fill('NH3'), chelates: [] },
  pointGroup: 'Oh',
  donorSetGroup: 'Oh',
  effectiveGroup: null,
  state: 'registered',
  lab,
  labs: 1,
  spectra: 1,
  strip: [],
  colour: '#f0c46a',
  visibility: 'programme',
  embargoUntil: null,
  updatedAt: '2026-01-01T00:00:00.000Z',
  notes: null,
  withdrawnReason: null,
  cautions: [],
  doubts: 0,
  evidence: [],
  preparations: [],
  history: [{ at: '2026-01-01T00:00:00.000Z', who: null, action: 'register', detail: {} }],
  siblings: [],
  may: { change: false, addSpectrum: false, download: false },
} satisfies ComplexRecord;

const spectrum = {
  id: 's1',
  lab,
  title: 'Curve 1',
  technique: 'solution',
  solvent: [{ name: 'water', volumeFraction: 1 }],
  temperature: 298,
  synthetic: true,
  flags: [],
  bandCount: 1,
  state: 'registered',
} as unknown as SpectrumSummary;

const band = {
  id: 'b1',
  wavenumber: 21550,
  wavelength: 464.04,
  height: 40.1,
  quantity: 'epsilon',
  epsilon: 40.1,
  fwhm: 3600,
  shoulder: false,
  oscillatorStrength: 6.6e-4,
  uncertainty: 60,
  found: 'picked',
  assignment: { class: 'd-d', from: '4A2g', to: '4T2g' },
  verdict: null,
  state: 'attested',
  proposedBy: null,
  judgedBy: null,
  judgement: null,
  may: { judge: false },
} satisfies BandRecord;

const sentences = { NO_CAUTION_COMPUTED: 'none computed', NO_RULE_MATCHED: 'no rule', STANDING_SENTENCE: 'standing' };
const page = (record: ComplexRecord, labs: { id: string; name: string }[] | null, alias: string | null = null) =>
  renderToStaticMarkup(
    <ComplexPage
      first={{ complex: record, etag: '"1"', alias, spectra: [spectrum], totalSpectra: 1, bands: { s1: [band] } }}
      ligands={[]}
      answers={{}}
      labs={labs}
      sentences={sentences}
    />,
  );
const text = (html: string) => html.replace(/<[^>]+>/g, ' ').replace(/\s+/g, ' ');

test('a guest reads the label, the bands and the history, and is offered nothing else', () => {
  const html = page(complex, null);
  const read = text(html);
  expect(read).toContain('ZF048609-D');
  expect(read).toMatch(/Cr\(III\) ?, group 6/);
  expect(read).toContain('SYNTHETIC');
  expect(read).toContain('registered');
  expect(read).toContain('no rule standing');
  expect(html).not.toMatch(/Add a spectrum|Edit<|Withdraw<|Preparations|Attest<|Dispute</);
});

test('a member who may change it is offered so, and its preparations', () => {
  const may = { change: true, addSpectrum: true, download: true };
  const html = page({ ...complex, may }, [lab]);
  expect(html).toContain('/spectra/new?complex=ZF048609-D');
  expect(html).toMatch(/Edit<[\s\S]*Withdraw</);
  expect(html).toContain('Add a preparation');
  expect(html).not.toContain('Delete draft');
});

test('a draft can be registered or deleted, a withdrawn record tells why and takes nothing', () => {
  const may = { change: true, addSpectrum: true, download: true };
  expect(page({ ...complex, may, state: 'draft' }, [lab])).toMatch(/Register<[\s\S]*Delete draft/);
  const withdrawn = page(
    { ...complex, may: { ...may, addSpectrum: false }, state: 'withdrawn', withdrawnReason: 'wrong salt' },
    [lab],
  );
  expect(text(withdrawn)).toContain('Withdrawn: wrong salt');
  expect(withdrawn).not.toMatch(/Add a spectrum|>Withdraw<|>Edit</);
});

test('the page of an accession that was merged says where it lives on', () => {
  const html = page(complex, [lab], 'ZF345002-L');
  expect(text(html)).toContain(`ZF345002-L was merged into this record and lives on as ${complex.accession}`);
  expect(text(page(complex, [lab]))).not.toContain('merged');
});

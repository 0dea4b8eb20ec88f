import type { DaySheet } from '#src/contracts/day-sheet.ts';
import { type Asker, isMember } from '../access/asker.ts';
import { endedFolios } from '../folios/ended.ts';
import { listFolios } from '../folios/list.ts';
import { countMergeTasks } from '../merges/tasks.ts';
import { listSpectra } from '../spectra/list.ts';
import { complexDrafts, spectrumDrafts } from './drafts.ts';
import { invitationsOut } from './invitations-out.ts';
import { requestsOpen } from './requests-open.ts';
import { bandsToAttest } from './to-attest.ts';

const RECENT = 8;
const nothing = { items: [], total: 0 };

/** The first page of somebody: what waits for them, all of it within their sight. Guests get their folios alone. */
export async function daySheet(asker: Asker): Promise<DaySheet> {
  const [folios, ended] = await Promise.all([grantedFolios(asker), endedFolios(asker)]);
  if (!isMember(asker)) {
    return {
      drafts: nothing,
      spectrumDrafts: nothing,
      toAttest: nothing,
      invitations: nothing,
      requests: nothing,
      mergeTasks: null,
      recentSpectra: [],
      folios,
      ended,
    };
  }
  const [drafts, unfinished, toAttest, invitations, requests, mergeTasks, recent] = await Promise.all([
    complexDrafts(asker),
    spectrumDrafts(asker),
    bandsToAttest(asker),
    invitationsOut(asker),
    requestsOpen(asker),
    countMergeTasks(asker),
    listSpectra(asker, { sort: '-created', limit: RECENT, facets: '0', state: ['registered'] }),
  ]);
  const recentSpectra = recent.items.map(({ id, title, formula, complex, lab, colour, createdAt, synthetic }) => ({
    id,
    title,
    formula,
    accession: complex,
    lab: lab.name,
    colour,
    createdAt,
    synthetic,
  }));
  const waiting = { drafts, spectrumDrafts: unfinished, toAttest, invitations, requests, mergeTasks };
  return { ...waiting, recentSpectra, folios, ended };
}

async function grantedFolios(asker: Asker): Promise<DaySheet['folios']> {
  if (asker.grants.length === 0) return [];
  const { items } = await listFolios(asker, { limit: 500 });
  return items.flatMap(({ id, name, lab, items: content, licence, level, expires }) =>
    level === null ? [] : [{ id, name, lab: lab.name, items: content.length, licence, access: level, expires }],
  );
}

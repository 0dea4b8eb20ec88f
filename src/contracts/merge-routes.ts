import { Paging, pageOf } from './common.ts';
import { ComplexRecord } from './complexes.ts';
import { MergeInput, MergeSettlement, MergeTask, SpectrumMove } from './merges.ts';
import { route } from './route.ts';
import { SpectrumRecord } from './spectra.ts';

const tag = 'Merging';

/** Routes of merging records of one complex, and of moving a spectrum to the right one. */
export const mergeRoutes = {
  listMergeTasks: route({
    method: 'GET',
    path: '/api/merge-tasks',
    summary: 'Pairs of records that look like one complex, the longest waiting first',
    tag,
    who: 'steward',
    scope: 'read',
    query: Paging,
    status: 200,
    answers: pageOf(MergeTask),
  }),
  settleMergeTask: route({
    method: 'POST',
    path: '/api/merge-tasks/{id}/settle',
    summary: 'Say that two records are different complexes',
    tag,
    who: 'steward',
    scope: 'write',
    body: MergeSettlement,
    status: 204,
    answers: null,
    refusals: { 409: 'It is settled' },
  }),
  mergeComplex: route({
    method: 'POST',
    path: '/api/complexes/{accession}/merge',
    summary: 'Merge this record into another one of the same complex; answers the one that lives on',
    tag,
    who: 'steward',
    scope: 'write',
    body: MergeInput,
    status: 200,
    answers: ComplexRecord,
    conditional: true,
    refusals: { 409: 'The two cannot be merged as they stand: something would come into sight, or they are not one' },
  }),
  moveSpectrum: route({
    method: 'POST',
    path: '/api/spectra/{id}/move',
    summary: 'Move a spectrum to the complex or isomer it belongs to; its judged bands are proposed again',
    tag,
    who: 'member',
    scope: 'write',
    body: SpectrumMove,
    status: 200,
    answers: SpectrumRecord,
    conditional: true,
    refusals: { 409: 'It cannot go there as things stand' },
  }),
};

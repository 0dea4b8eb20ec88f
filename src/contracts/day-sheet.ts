/** What waits for somebody, as the first page shows it; it is not on the wire, since the page is drawn on the server. */
export interface DaySheet {
  drafts: Waiting<{ accession: string; formula: string; lab: string; updatedAt: string }>;
  spectrumDrafts: Waiting<{ id: string; title: string; formula: string; createdAt: string }>;
  /** Spectra with assignments that the asker may attest and did not propose. */
  toAttest: Waiting<{ id: string; title: string; formula: string; lab: string; bands: number; classes: string[] }>;
  /** Sent by the asker and still open. */
  invitations: Waiting<{ id: string; email: string; to: string; href: string; expiresAt: string }>;
  /** Pairs of records that wait to be merged or told apart; null for everybody but a steward. */
  mergeTasks: number | null;
  /** Asked by guests of folios of labs that the asker leads, and not answered yet. */
  requests: Waiting<{
    id: string;
    name: string;
    wants: 'download' | 'longer' | 'other';
    folio: string;
    folioId: string;
    createdAt: string;
  }>;
  recentSpectra: {
    id: string;
    title: string;
    formula: string;
    accession: string;
    lab: string;
    colour: string | null;
    createdAt: string;
    synthetic: boolean;
  }[];
  /** Folios granted to the asker by labs of others. */
  folios: {
    id: string;
    name: string;
    lab: string;
    items: number;
    licence: string;
    access: 'view' | 'download';
    expires: string | null;
  }[];
  /** Folios that were granted and whose access ended lately. */
  ended: { id: string; name: string; lab: string; endedAt: string; contact: string | null }[];
}

/** The first few, and how many there are in all. */
export interface Waiting<T> {
  items: T[];
  total: number;
}

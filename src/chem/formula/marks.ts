const PREFIX =
  /^(?:(?:μ|mu)_?\^?(\d?)|(?:η|eta|h)\^?(\d{1,2})|(?:κ|kappa)\^?(\d?)((?:[A-Z][a-z]?[′″]*,?(?:κ(?=[A-Z]))?)*))-/;
/** κ written behind a ligand: `SO4-κ2O,O′`. */
export const KAPPA_SUFFIX = /-κ\^?(\d?)((?:[A-Z][a-z]?[′″]*,?(?:κ(?=[A-Z]))?)+)$/;

/** Donor atoms that a κ names: how many, and the symbol of the first where one is given. */
export interface Kappa {
  count: number;
  atom: string | null;
}

/** What is written before a ligand of how it binds. */
export interface Marks {
  mu: number | null;
  hapticity: number | null;
  kappa: Kappa | null;
}

export const NO_MARKS: Marks = { mu: null, hapticity: null, kappa: null };

/** `κ2`, `κO`, `κ2O,O′`, `κN,κO`: a number, else as many as atoms are named. */
export function kappaOf(digits: string, atoms: string): Kappa {
  const named = atoms.match(/[A-Z][a-z]?/g) ?? [];
  return { count: digits === '' ? Math.max(1, named.length) : Number(digits), atom: named[0] ?? null };
}

/** Strip `μ-`, `μ3-`, `η5-` from the front of a text. */
export function readMarks(text: string, before: Marks): { marks: Marks; length: number } {
  let length = 0;
  const marks = { ...before };
  for (let match = PREFIX.exec(text); match; match = PREFIX.exec(text.slice(length))) {
    const [whole, mu, eta, kappa, atoms] = match;
    if (eta !== undefined) marks.hapticity = Number(eta);
    else if (kappa !== undefined) marks.kappa = kappaOf(kappa, atoms ?? '');
    else marks.mu = mu ? Number(mu) : 2;
    length += whole.length;
  }
  return { marks, length };
}

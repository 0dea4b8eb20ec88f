import { compose, type MailContent, oneLine } from './templates.ts';

type Role = 'lead' | 'contributor';

/** To somebody whom a steward put into a lab. */
export function addedToLab(facts: { by: string; lab: string; role: Role; link: string }): MailContent {
  return compose(`You are a ${facts.role} of ${facts.lab} now`, [
    `${oneLine(facts.by)} added you to ${oneLine(facts.lab)} as ${facts.role}.`,
    { label: 'Open the lab', link: facts.link },
  ]);
}

/** To somebody whose role a lead or a steward changed. */
export function roleChanged(facts: { by: string; lab: string; role: Role; link: string }): MailContent {
  return compose(`You are a ${facts.role} of ${facts.lab} now`, [
    `${oneLine(facts.by)} made you ${facts.role} of ${oneLine(facts.lab)}.`,
    { label: 'Open the lab', link: facts.link },
  ]);
}

/** To somebody whom a lead or a steward took out of a lab. */
export function removedFromLab(facts: { by: string; lab: string }): MailContent {
  return compose(`You are no longer a member of ${facts.lab}`, [
    `${oneLine(facts.by)} removed you from ${oneLine(facts.lab)}.`,
    'Drafts that you had there stay with the lab. What you registered keeps your name.',
  ]);
}

/** To somebody named in a text about a record that they see. */
export function mentioned(facts: {
  by: string;
  /** What the text is, with formula and accession: "the notes of [Ni(OH2)6]2+ (ZF000042-X)". */
  where: string;
  sentence: string;
  link: string;
}): MailContent {
  return compose(`${facts.by} mentioned you in ${facts.where}`, [
    `${oneLine(facts.by)} mentioned you in ${oneLine(facts.where)}:`,
    oneLine(facts.sentence),
    { label: 'Open it', link: facts.link },
  ]);
}

/** To the proposer of an assignment that another person disputed. */
export function disputed(facts: { by: string; where: string; reason: string; link: string }): MailContent {
  return compose(`${facts.by} disputes an assignment of yours`, [
    `${oneLine(facts.by)} disputes the assignment that you proposed for ${oneLine(facts.where)}, with this reason:`,
    facts.reason,
    { label: 'Open the spectrum', link: facts.link },
  ]);
}

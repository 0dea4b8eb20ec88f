import { longDay } from '../ui/dates.ts';
import { licenceOf } from './licences.ts';

/** What a guest agrees to, in words: the licence, what is recorded, and when it ends. */
export function LicenceTerms({ licence, until }: { licence: string; until: string | null }) {
  const words = licenceOf(licence);
  return (
    <ul className="flex list-disc flex-col gap-1.5 pl-5">
      <li>
        <b className="font-semibold">Licence: </b>
        {words ? (
          <a href={words.href} className="link" target="_blank" rel="noreferrer">
            {words.label}
            <span className="sr-only"> (its text, in a new tab)</span>
          </a>
        ) : (
          licence
        )}
        . {words?.allows} The text of the licence decides.
      </li>
      <li>You read only; nothing here is yours to change.</li>
      <li>What you look at and what you download is recorded, with the day; the lab can see it.</li>
      <li>
        {until ? `Access ends on ${longDay(until)} (UTC). ` : ''}
        The lab may end it before. What you downloaded stays yours to use under its licence.
      </li>
    </ul>
  );
}

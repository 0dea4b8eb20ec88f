import type { PersonRecord } from '../../contracts/people.ts';
import { shortDay } from '../ui/dates.ts';
import type { DataColumn } from '../ui/table-csv.ts';

/** What somebody is in the registry: a steward, a member, a guest with folios, or neither. */
export function partOf({ steward, labs, folios }: Pick<PersonRecord, 'steward' | 'labs' | 'folios'>): string {
  if (steward) return 'steward';
  if (labs.length > 0) return 'member';
  return folios > 0 ? 'guest' : 'no access';
}

const day = (instant: string | null) => instant?.slice(0, 10) ?? null;

export const PEOPLE_COLUMNS: DataColumn<PersonRecord>[] = [
  { id: 'name', header: 'Name', value: (row) => row.name },
  { id: 'email', header: 'Address', value: (row) => row.email },
  { id: 'part', header: 'Part', value: partOf },
  {
    id: 'labs',
    header: 'Labs',
    value: ({ labs }) => labs.map(({ name, role }) => `${name} (${role})`).join(', ') || null,
    cell: ({ labs }) =>
      labs.length === 0 ? (
        '–'
      ) : (
        <ul>
          {labs.map(({ id, name, role }) => (
            <li key={id}>
              <a href={`/labs/${id}`} className="link">
                {name}
              </a>
              <span className="text-ink-soft">, {role}</span>
            </li>
          ))}
        </ul>
      ),
  },
  { id: 'folios', header: 'Folios', value: (row) => row.folios, figures: true },
  { id: 'factor', header: 'Second factor', value: (row) => (row.secondFactor ? 'yes' : 'no') },
  {
    id: 'seen',
    header: 'Last sign-in',
    value: (row) => day(row.lastSignInAt),
    cell: ({ lastSignInAt }) => (
      <span className="whitespace-nowrap">{lastSignInAt ? shortDay(lastSignInAt) : 'none in 90 days'}</span>
    ),
  },
  {
    id: 'state',
    header: 'State',
    value: (row) => row.state,
    cell: ({ state, deactivatedAt }) =>
      state === 'active' ? (
        'active'
      ) : (
        <span className="text-alert">deactivated{deactivatedAt ? `, ${shortDay(deactivatedAt)}` : ''}</span>
      ),
  },
];

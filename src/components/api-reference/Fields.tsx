import type { SchemaRow } from './schema-rows.ts';
import { TypeText } from './TypeText.tsx';

const INSET = ['', 'pl-5', 'pl-10', 'pl-15', 'pl-20'];
const CELL = 'h-auto! border-0! py-1.5! align-baseline!';

/** Fields of a body, an answer or a schema. `name` says of what; it names the region that scrolls. */
export function Fields({ name, rows }: { name: string; rows: readonly SchemaRow[] }) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
    <section aria-label={name} tabIndex={0} className="overflow-x-auto">
      <table className="table table-compact">
        <thead>
          <tr>
            <th scope="col">Field</th>
            <th scope="col">Type</th>
            <th scope="col">Meaning</th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row, i) => (
            <tr key={i} className="border-b border-faint last:border-0">
              <th scope="row" className={`${CELL} text-sm! text-ink!`}>
                <span className={`num ${INSET[Math.min(row.depth, INSET.length - 1)]}`}>{row.name}</span>
                {row.required && <span className="ml-2 text-xs text-ink-soft">needed</span>}
              </th>
              <td className={`${CELL} min-w-48 whitespace-normal!`}>
                <TypeText type={row.type} />
              </td>
              <td className={`${CELL} min-w-48 text-ink-soft whitespace-normal!`}>
                {[row.description.replace(/\.$/, ''), row.limits].filter(Boolean).join('; ')}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}

/** Lines for a shell. */
export function Code({ name, text }: { name: string; text: string }) {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
    <section aria-label={name} tabIndex={0} className="overflow-x-auto border border-hairline bg-porcelain px-3 py-2">
      <pre className="num text-xs">{text}</pre>
    </section>
  );
}

import { PointGroup } from '#src/components/notation/index.tsx';
import { groupFamilies } from './group-families.ts';
import { addressOf } from './symmetry-address.ts';

const FAMILY = /^([CDS])(2?n)(\w*)$/;

/** Every point group, by family. Each is a link, so that it opens in a new tab and without scripts as well. */
export function GroupPicker({ group, onChoose }: { group: string; onChoose: (symbol: string) => void }) {
  return (
    <nav aria-label="Point groups">
      <dl className="grid grid-cols-[auto_1fr] items-baseline gap-x-3 gap-y-1.5 md:max-lg:grid-cols-[auto_1fr_auto_1fr]">
        {groupFamilies.map(({ name, symbols }) => (
          <div key={name} className="contents">
            <dt className="text-ink-soft">{FAMILY.test(name) ? <FamilyName name={name} /> : name}</dt>
            <dd className="flex flex-wrap gap-1">
              {symbols.map((symbol) => (
                <a
                  key={symbol}
                  href={`/symmetry${addressOf({ group: symbol })}`}
                  aria-current={symbol === group ? 'true' : undefined}
                  onClick={(event) => {
                    if (event.ctrlKey || event.metaKey || event.shiftKey) return;
                    event.preventDefault();
                    onChoose(symbol);
                  }}
                  className="inline-flex min-h-7 min-w-8 items-center justify-center rounded border border-transparent px-1 text-ink no-underline hover:border-zaffre hover:text-zaffre aria-[current]:border-zaffre aria-[current]:bg-zaffre-wash aria-[current]:font-semibold aria-[current]:text-zaffre"
                >
                  <PointGroup group={symbol} />
                </a>
              ))}
            </dd>
          </div>
        ))}
      </dl>
    </nav>
  );
}

/** `Cnv`: the letter italic, n in the index italic, too, as it is a number to be chosen. */
function FamilyName({ name }: { name: string }) {
  const [, letter, order, suffix] = FAMILY.exec(name) ?? [];
  return (
    <span className="whitespace-nowrap">
      <i>{letter}</i>
      <sub>
        {order?.replace('n', '')}
        <i>n</i>
        {suffix}
      </sub>
    </span>
  );
}

import { useId, useState } from 'react';
import type { LigandReading } from '#src/chem/formula/index.ts';
import type { Geometry, IsomerList } from '#src/chem/geometry/index.ts';
import { Polyhedron } from '#src/components/marks/Polyhedron.tsx';
import { Formula, PointGroup } from '#src/components/notation/index.tsx';
import { Button } from '#src/components/ui/Button.tsx';
import { countSentence, type IsomerCard, isomerCards, pickValue } from './isomer-cards.ts';
import type { IsomerPick } from './settle.ts';
import { siteLetters } from './site-letters.ts';

/** Cards that are drawn at first; more on request. */
const AT_FIRST = 12;

interface IsomerChoiceProps {
  list: IsomerList;
  geometry: Geometry;
  ligands: readonly LigandReading[];
  pick: IsomerPick;
  onPick: (pick: IsomerPick) => void;
  draw: typeof import('#src/chem/geometry/index.ts').drawPolyhedron;
}

/** The stereoisomers, drawn to choose from; not to state one is a choice. */
export function IsomerChoice({ list, geometry, ligands, pick, onPick, draw }: IsomerChoiceProps) {
  const name = useId();
  const [showsAll, setShowsAll] = useState(false);
  const cards = isomerCards(list);
  const chosen = cards.findIndex(({ value }) => value === pickValue(pick));
  const shown = showsAll ? cards : cards.slice(0, Math.max(AT_FIRST, chosen + 1));
  const { key } = siteLetters(list.isomers[0]?.sites ?? [], ligands);
  const mayBeOpen = list.count - list.enantiomericPairs > 1;

  return (
    <fieldset className="min-w-0">
      <legend className="mb-2 flex flex-wrap items-baseline gap-x-3">
        <span className="text-base font-semibold">Isomer</span>
        <span className="text-xs text-ink-soft">{countSentence(list)}, ring pucker and substituents left out</span>
        {mayBeOpen && (
          <label className={PILL}>
            <input type="radio" name={name} className="sr-only" checked={pick === null} onChange={() => onPick(null)} />
            not stated
          </label>
        )}
      </legend>
      <div className="grid grid-cols-[repeat(auto-fill,minmax(248px,1fr))] gap-3">
        {shown.map((card) => (
          <Card
            key={card.value}
            {...{ card, name, geometry, ligands, draw }}
            isChosen={card.value === pickValue(pick)}
            onPick={() => onPick(card.pick)}
          />
        ))}
      </div>
      {mayBeOpen && pick === null && (
        <p className="mt-2 text-xs text-ink-soft">
          Not stated makes a record of its own: no point group is given, and no selection rule follows from one.
        </p>
      )}
      {key.length > 0 && (
        <p className="mt-2 flex flex-wrap gap-x-4 text-xs text-ink-soft">
          {key.map(({ letter, ligand }) => (
            <span key={letter}>
              <span className="num text-ink">{letter}</span> of <Formula formula={ligand} />
            </span>
          ))}
        </p>
      )}
      {shown.length < cards.length && (
        <Button size="small" className="mt-3" onClick={() => setShowsAll(true)}>
          Draw all {cards.length}
        </Button>
      )}
    </fieldset>
  );
}

const PILL =
  'flex min-h-7 cursor-pointer items-center rounded border border-hairline bg-glaze px-2.5 text-xs hover:border-zaffre has-checked:border-zaffre has-checked:bg-zaffre-wash has-checked:font-semibold has-checked:text-zaffre has-focus-visible:outline-2 has-focus-visible:outline-zaffre';
const CARD =
  'flex min-h-[128px] cursor-pointer rounded border border-hairline bg-glaze outline-offset-2 hover:border-zaffre has-checked:border-zaffre has-checked:bg-zaffre-wash has-checked:shadow-[inset_0_0_0_1px_var(--color-zaffre)] has-focus-visible:outline-2 has-focus-visible:outline-zaffre';

interface CardProps {
  card: IsomerCard;
  name: string;
  isChosen: boolean;
  geometry: Geometry;
  ligands: readonly LigandReading[];
  draw: IsomerChoiceProps['draw'];
  onPick: () => void;
}

function Card({ card: { isomer, title, remark }, name, isChosen, geometry, ligands, draw, onPick }: CardProps) {
  const { letters } = siteLetters(isomer.sites, ligands);
  return (
    <label className={`${CARD} items-center gap-4 px-4 py-3`}>
      <input type="radio" name={name} className="sr-only" checked={isChosen} onChange={onPick} />
      <Polyhedron
        drawing={draw(geometry, isomer.chelates, { size: 104 })}
        sites={letters}
        title={`${title}, ${geometry.name}`}
      />
      <span className="flex min-w-0 flex-col gap-0.5">
        <b className={`font-semibold break-words ${title.length > 24 ? 'text-xs' : 'text-base'}`}>{title}</b>
        <PointGroup group={isomer.pointGroup} />
        <span className="text-xs text-ink-soft">{remark}</span>
      </span>
    </label>
  );
}

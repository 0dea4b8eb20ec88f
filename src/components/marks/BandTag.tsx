import { bandStyle } from './band-classes.ts';

/** The letter tile of a class of band. The name stands beside it, or is read aloud and shown as a tooltip. */
export function BandTag({ bandClass, withName = false }: { bandClass: string | null; withName?: boolean }) {
  const { letter, name, colour, stroke } = bandStyle(bandClass);
  const hollow = stroke.kind === 'hollow';
  return (
    <span className="inline-flex items-center gap-2 align-middle">
      <span
        {...(withName ? { 'aria-hidden': true } : { role: 'img', 'aria-label': name, title: name })}
        className={`keep-ink inline-grid size-5 flex-none place-items-center rounded-sm text-xs leading-none font-semibold ${hollow ? 'border' : 'text-on-band'}`}
        style={hollow ? { borderColor: colour, color: colour } : { backgroundColor: colour }}
      >
        {letter}
      </span>
      {withName && name}
    </span>
  );
}

/** A short piece of the stroke of a class, as the key to strips and plots. */
export function BandStroke({ bandClass }: { bandClass: string | null }) {
  const { colour, stroke } = bandStyle(bandClass);
  return (
    <svg width="26" height="8" viewBox="0 0 26 8" aria-hidden="true" className="inline-block align-middle">
      {stroke.kind === 'hollow' && <rect x="1" y="2" width="24" height="4" fill="none" stroke={colour} />}
      {stroke.kind === 'double' && <path d="M0 2.5H26M0 5.5H26" stroke={colour} strokeWidth="1.2" />}
      {stroke.kind === 'dashed' && (
        <path d="M0 4H26" stroke={colour} strokeWidth="2.4" strokeDasharray={stroke.dash || undefined} />
      )}
    </svg>
  );
}

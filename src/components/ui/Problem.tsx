import { toProblemError } from './problem-error.ts';

/** `#/bands/0/height` as people read it: "bands 1, height". */
export function readPointer(pointer: string): string {
  return pointer
    .replace(/^#?\/?/, '')
    .split('/')
    .map((part) => part.replaceAll('~1', '/').replaceAll('~0', '~'))
    .reduce((text, part) => {
      if (/^\d+$/.test(part)) return `${text} ${Number(part) + 1}`;
      return text ? `${text}, ${part}` : part;
    }, '');
}

/** The sign-in page, which leads back here. */
function signInHere(): string {
  if (typeof location === 'undefined') return '/signin';
  return `/signin?${new URLSearchParams({ next: location.pathname + location.search })}`;
}

/** A refusal with its reasons. `onRetry` where another try may help. */
export function Problem({ problem, onRetry }: { problem: unknown; onRetry?: () => void }) {
  if (!problem) return null;
  const { title, detail, errors, status } = toProblemError(problem);
  const lines = errors.filter((error) => error.detail !== detail);
  return (
    <div role="alert" className="border border-alert-line border-l-3 border-l-alert bg-alert-wash px-4 py-3">
      <p className="font-semibold text-alert">{title}</p>
      {detail && detail !== title && <p className="mt-0.5">{detail}</p>}
      {lines.length > 0 && (
        <ul className="mt-1.5 flex flex-col gap-0.5">
          {lines.map((error) => (
            <li key={`${error.pointer} ${error.detail} ${error.position}`}>
              {error.pointer && <span className="num mr-2 text-ink-soft">{readPointer(error.pointer)}</span>}
              {error.detail}
              {error.position !== undefined && <span className="text-ink-soft"> (at {error.position})</span>}
            </li>
          ))}
        </ul>
      )}
      {status === 401 && (
        <p className="mt-1.5">
          <a href={signInHere()} className="link">
            Sign in again
          </a>{' '}
          and come back to this page.
        </p>
      )}
      {onRetry && (status === 0 || status >= 500 || status === 429) && (
        <button type="button" onClick={onRetry} className="link mt-1.5">
          Try again
        </button>
      )}
    </div>
  );
}

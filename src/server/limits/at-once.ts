import { HttpError } from '../http.ts';

interface Line {
  running: number;
  waiting: (() => void)[];
}

/**
 * So many pieces of work at once for each of many keys, within this process. What comes on top waits for its turn, in
 * order; more than `waiting` of them, or one that waited for `waitMs` milliseconds, is turned away.
 */
export class AtOnce {
  private readonly lines = new Map<string, Line>();

  constructor(private readonly limit: { most: number; waiting: number; waitMs: number }) {}

  /**
   * Wait for a turn.
   *
   * @param signal - of the request: who has gone waits no longer
   * @returns gives the turn back; to be called once, whatever becomes of the work
   * @throws {HttpError} 429 with Retry-After
   */
  async enter(key: string, signal: AbortSignal): Promise<() => void> {
    const line = this.lines.get(key) ?? { running: 0, waiting: [] };
    this.lines.set(key, line);
    if (line.running < this.limit.most) line.running += 1;
    else await this.turn(line, signal);
    return () => this.leave(key, line);
  }

  private turn(line: Line, signal: AbortSignal): Promise<void> {
    if (signal.aborted) return Promise.reject(signal.reason);
    if (line.waiting.length >= this.limit.waiting) return Promise.reject(this.refusal());
    return new Promise((resolve, reject) => {
      const end = (done: () => void) => {
        clearTimeout(timer);
        signal.removeEventListener('abort', gone);
        const place = line.waiting.indexOf(begin);
        if (place >= 0) line.waiting.splice(place, 1);
        done();
      };
      const begin = () => end(resolve);
      const gone = () => end(() => reject(signal.reason));
      const timer = setTimeout(() => end(() => reject(this.refusal())), this.limit.waitMs);
      signal.addEventListener('abort', gone, { once: true });
      line.waiting.push(begin);
    });
  }

  private leave(key: string, line: Line): void {
    const next = line.waiting[0];
    if (next) {
      // The turn passes on: the number of those that run stays.
      next();
      return;
    }
    line.running -= 1;
    if (line.running === 0) this.lines.delete(key);
  }

  private refusal(): HttpError {
    return new HttpError(429, `${this.limit.most} of your derivations run and others wait: send fewer at once`, {
      headers: { 'retry-after': '2' },
    });
  }
}

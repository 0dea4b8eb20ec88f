/**
 * A line to somebody slow: one question is under way, and of those that come meanwhile only the last is kept. Questions
 * go out with a frame of the display, so that a slider never asks more often than can be seen.
 */
export class LatestWins<Question> {
  #waiting: { question: Question } | null = null;
  #running: number | null = null;
  #framed = false;
  #last = 0;

  constructor(
    readonly send: (id: number, question: Question) => void,
    readonly onFrame: (run: () => void) => void,
  ) {}

  ask(question: Question): void {
    this.#waiting = { question };
    this.#arrange();
  }

  /** What was asked last is no longer wanted, and what is under way neither. */
  forget(): void {
    this.#waiting = null;
    this.#last += 1;
  }

  /** @returns whether the answer is to be shown: it is of the latest question sent, even if a newer one waits */
  answered(id: number): boolean {
    if (id !== this.#running) return false;
    this.#running = null;
    this.#arrange();
    return id === this.#last;
  }

  #arrange(): void {
    if (this.#framed || this.#running !== null || !this.#waiting) return;
    this.#framed = true;
    this.onFrame(() => {
      this.#framed = false;
      const waiting = this.#waiting;
      if (!waiting) return;
      this.#waiting = null;
      this.#running = this.#last += 1;
      this.send(this.#running, waiting.question);
    });
  }
}

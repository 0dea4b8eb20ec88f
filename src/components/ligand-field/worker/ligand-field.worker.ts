import { DomainError } from '#src/chem/errors.ts';
import { type TaskName, tasks } from './tasks.ts';

export interface WorkerQuestion {
  id: number;
  name: TaskName;
  asked: unknown;
}
export type WorkerAnswer = { id: number } & ({ answer: unknown; milliseconds: number } | { refusal: string });

const scope = self as unknown as {
  onmessage: (event: MessageEvent<WorkerQuestion>) => void;
  postMessage: (message: WorkerAnswer) => void;
};

scope.onmessage = ({ data: { id, name, asked } }) => {
  const begun = performance.now();
  try {
    const answer = (tasks[name] as (asked: unknown) => unknown)(asked);
    scope.postMessage({ id, answer, milliseconds: performance.now() - begun });
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    scope.postMessage({ id, refusal: error.message });
  }
};

import { parentPort } from 'node:worker_threads';
import { DomainError } from '#src/chem/errors.ts';
import { tasks } from './tasks.ts';

/** What a worker is asked. */
export interface Question {
  id: number;
  name: string;
  input: unknown;
}

/** What it answers; an error travels as plain data, since threads do not share classes. */
export type Answer = { id: number } & (
  | { value: unknown }
  | { domain: Pick<DomainError, 'code' | 'message' | 'field' | 'position'> }
  | { failure: string }
);

function answer({ id, name, input }: Question): Answer {
  try {
    if (!Object.hasOwn(tasks, name)) throw new Error(`there is no derivation ${name}`);
    const task = tasks[name as keyof typeof tasks] as (input: unknown) => unknown;
    return { id, value: task(input) };
  } catch (error) {
    if (error instanceof DomainError) {
      const { code, message, field, position } = error;
      return { id, domain: { code, message, field, position } };
    }
    return { id, failure: error instanceof Error ? (error.stack ?? error.message) : String(error) };
  }
}

parentPort?.on('message', (question: Question) => parentPort?.postMessage(answer(question)));
parentPort?.postMessage('ready');

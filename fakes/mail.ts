import { randomUUID } from 'node:crypto';
import { createServer, type IncomingMessage } from 'node:http';
import type { AddressInfo } from 'node:net';
import { json } from 'node:stream/consumers';

export interface SentMail {
  id: string;
  idempotencyKey: string | undefined;
  from: string;
  to: string[];
  subject: string;
  text: string;
  html: string;
}

export interface MailService {
  baseUrl: string;
  /** What was taken, each mail once, the newest last; only the last 1000 are kept. */
  sent: readonly SentMail[];
  /** Answer the next `count` requests with this status, or break the connection (status 0). */
  failNext(count: number, status: number, name?: string): void;
  close(): Promise<void>;
}

const KEPT = 1000;

/**
 * A stand-in for the mail service on a free port of this machine. It takes `POST /emails`, sends nothing, and answers
 * a repeated idempotency key with the first answer.
 */
export async function startMailService(): Promise<MailService> {
  const sent: SentMail[] = [];
  let fault = { left: 0, status: 500, name: 'internal_server_error' };

  const take = async (request: IncomingMessage): Promise<{ status: number; body: unknown }> => {
    if (request.method !== 'POST' || request.url !== '/emails')
      return { status: 404, body: { statusCode: 404, name: 'not_found', message: 'not served' } };
    const body = (await json(request)) as Omit<SentMail, 'id' | 'to'> & { to: string | string[] };
    const idempotencyKey = request.headers['idempotency-key'] as string | undefined;
    const before = idempotencyKey && sent.find((mail) => mail.idempotencyKey === idempotencyKey);
    if (before) return { status: 200, body: { id: before.id } };
    const mail = { ...body, to: [body.to].flat(), id: randomUUID(), idempotencyKey };
    sent.push(mail);
    if (sent.length > KEPT) sent.shift();
    return { status: 200, body: { id: mail.id } };
  };

  const server = createServer((request, response) => {
    if (fault.left > 0) {
      fault.left--;
      if (fault.status === 0) return void request.destroy();
      response.writeHead(fault.status, { 'content-type': 'application/json' });
      return void response.end(JSON.stringify({ statusCode: fault.status, name: fault.name, message: 'told to fail' }));
    }
    take(request).then(
      ({ status, body }) => {
        response.writeHead(status, { 'content-type': 'application/json' });
        response.end(JSON.stringify(body));
      },
      () => request.destroy(),
    );
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  // A program that has nothing else to do may end.
  server.unref();

  return {
    baseUrl: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    sent,
    failNext: (left, status, name = 'internal_server_error') => {
      fault = { left, status, name };
    },
    close: () =>
      new Promise((resolve) => {
        server.close(() => resolve());
        server.closeAllConnections();
      }),
  };
}

import pino from 'pino';

/** Fields whose value never reaches a log line, at the top and one level down. */
const SECRET = ['password', 'token', 'secret', 'authorization', 'cookie', 'set-cookie', 'apiKey', 'authSecret'];

const quoted = (field: string) => (field.includes('-') ? `["${field}"]` : field);

/**
 * The program's log: one JSON object a line on standard output, `LOG_LEVEL` deep, silent under the test runner.
 * Pass what happened as fields (`requestId` among them) and a plain sentence.
 */
export const log = pino({
  level: process.env.VITEST ? 'silent' : process.env.LOG_LEVEL || 'info',
  base: null,
  timestamp: pino.stdTimeFunctions.isoTime,
  formatters: { level: (label) => ({ level: label }) },
  redact: {
    paths: SECRET.flatMap((field) => [quoted(field), field.includes('-') ? `*${quoted(field)}` : `*.${field}`]),
    censor: '[left out]',
  },
});

/** A log whose lines all carry the id of one request. */
export const requestLog = (requestId: string) => log.child({ requestId });

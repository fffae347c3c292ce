import pino from 'pino';

/** JSON lines on standard error; bodies, cookies and tokens never reach it. */
export const logger = pino(
  {
    level:
      process.env['CRAGLINE_LOG'] ??
      (process.env['NODE_ENV'] === 'production' ? 'error' : 'silent'),
    timestamp: pino.stdTimeFunctions.isoTime,
    base: null,
  },
  pino.destination({ dest: 2, sync: true }),
);

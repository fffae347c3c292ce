import { z } from 'zod';

const isLoopback = (host: string) => /^(127\.|localhost$|::1$|\[::1\]$)/.test(host);

const environmentSchema = z
  .object({
    HOST: z.string().default('127.0.0.1'),
    PORT: z.coerce.number().int().min(1).max(65535).default(4173),
    CRAGLINE_DATA: z.string().default('.data'),
    CRAGLINE_DB_URL: z.string().startsWith('mariadb://', 'CRAGLINE_DB_URL starts with mariadb://'),
    CRAGLINE_DB_OWNER_URL: z.string().startsWith('mariadb://').optional(),
    CRAGLINE_URL: z.string().optional(),
    CRAGLINE_TLS_CERT: z.string().optional(),
    CRAGLINE_TLS_KEY: z.string().optional(),
    CRAGLINE_TEST: z.enum(['0', '1']).default('0'),
    CRAGLINE_DEMO: z.enum(['0', '1']).default('1'),
    CRAGLINE_TOKEN_KEY: z
      .string()
      .min(
        32,
        'CRAGLINE_TOKEN_KEY is too short: it needs 256 random bits (32 characters or more).',
      ),
    CRAGLINE_SEAL_KEY: z
      .string()
      .min(32, 'CRAGLINE_SEAL_KEY is too short: it needs 256 random bits (32 characters or more).'),
    CRAGLINE_CALC_PER_MINUTE: z.coerce.number().int().positive().default(600),
    CRAGLINE_REQUESTS_PER_MINUTE: z.coerce.number().int().positive().default(3000),
    CRAGLINE_SIGN_IN_TRIES: z.coerce.number().int().positive().default(10),
    CRAGLINE_LOG: z.enum(['silent', 'error', 'info']).default('error'),
  })
  .transform((env) => ({
    host: env.HOST,
    port: env.PORT,
    dataFolder: env.CRAGLINE_DATA,
    databaseUrl: env.CRAGLINE_DB_URL,
    ownerUrl: env.CRAGLINE_DB_OWNER_URL ?? env.CRAGLINE_DB_URL,
    /** The address that people use, in one-time links and QR codes. */
    publicUrl:
      env.CRAGLINE_URL ?? `${env.CRAGLINE_TLS_CERT ? 'https' : 'http'}://${env.HOST}:${env.PORT}`,
    tls:
      env.CRAGLINE_TLS_CERT && env.CRAGLINE_TLS_KEY
        ? { certFile: env.CRAGLINE_TLS_CERT, keyFile: env.CRAGLINE_TLS_KEY }
        : null,
    isTest: env.CRAGLINE_TEST === '1',
    wantsDemo: env.CRAGLINE_DEMO === '1',
    isLoopback: isLoopback(env.HOST),
    tokenKey: env.CRAGLINE_TOKEN_KEY,
    sealKey: env.CRAGLINE_SEAL_KEY,
    calculationsPerMinute: env.CRAGLINE_CALC_PER_MINUTE,
    requestsPerMinute: env.CRAGLINE_REQUESTS_PER_MINUTE,
    signInTries: env.CRAGLINE_SIGN_IN_TRIES,
    logLevel: env.CRAGLINE_LOG,
  }));

export type Config = z.infer<typeof environmentSchema>;

/** The environment, parsed once. @throws ZodError whose first message is a sentence for the operator. */
export function readConfig(environment: NodeJS.ProcessEnv): Config {
  return environmentSchema.parse(environment);
}

import { z } from 'zod';

/** A whole number written plainly; anything else is refused, never repaired. */
const whole = (fallback: number, min: number, max: number) =>
  z
    .string()
    .regex(/^\d{1,6}$/, 'a whole number')
    .default(String(fallback))
    .transform(Number)
    .refine((n) => n >= min && n <= max, `between ${min} and ${max}`);

const optional = <T extends z.ZodType>(schema: T) =>
  z.preprocess((value) => (value === '' ? undefined : value), schema.optional());

const postgresUrl = z.string().regex(/^postgres(ql)?:\/\/\S+$/, 'a postgres:// address');

const envSchema = z.object({
  NODE_ENV: z.enum(['development', 'test', 'production']).default('development'),
  HOST: z.string().min(1).default('127.0.0.1'),
  PORT: whole(3100, 0, 65_535),
  /** The application's login: owns nothing. */
  DATABASE_URL: postgresUrl,
  /** The owner's login: migrations and seed. */
  DATABASE_OWNER_URL: optional(postgresUrl),
  SMTP_URL: optional(z.string().regex(/^smtps?:\/\/\S+$/, 'an smtp:// address')),
  MAIL_FROM: z.string().min(3).default('Brimline <brimline@localhost>'),
  PUBLIC_URL: z.url({ protocol: /^https?$/ }).transform((url) => url.replace(/\/+$/, '')),
  /** Where the program's own mail fake can be read; set by the start program only. */
  BRIMLINE_MAILBOX: optional(z.string().min(1)),
  BRIMLINE_CLOCK_FILE: optional(z.string().min(1)),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent']).default('info'),
  SESSION_IDLE_MINUTES: whole(15, 1, 1440),
  SESSION_ABSOLUTE_HOURS: whole(12, 1, 168),
  LOCKOUT_TRIES: whole(5, 1, 100),
  LOCKOUT_MINUTES: whole(15, 1, 1440),
  BESIDE_MINUTES: whole(10, 1, 120),
});

export type Env = z.output<typeof envSchema>;

/** The program's settings, read once; throws one error that names every setting that is missing or wrong. */
export function parseEnv(source: Readonly<Record<string, string | undefined>>): Env {
  const parsed = envSchema.safeParse(source);
  if (parsed.success) return parsed.data;
  const faults = parsed.error.issues.map((issue) => `  ${issue.path.join('.')}: ${issue.message}`);
  throw new Error(`The settings are not usable:\n${faults.join('\n')}`);
}

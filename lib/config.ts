/**
 * The environment, parsed once and frozen; the only file that reads process.env. Nothing is read when this module is
 * loaded, so a build needs no environment: the server asks at its start (instrumentation.ts), each command in its first
 * line. An empty string counts as unset. Every name that is missing or malformed is told at once.
 */
import { z } from 'zod';

const LOG_LEVELS = ['trace', 'debug', 'info', 'warn', 'error', 'fatal', 'silent'] as const;

const environment = z
  .object({
    NODE_ENV: z.enum(['development', 'test', 'production']).default('development'),
    /** Where people reach the app, without a path: links in mails and the check of origins build on it. */
    APP_URL: z.url({ protocol: /^https?$/ }).transform((url) => new URL(url).origin),
    NEXTAUTH_SECRET: z.string().min(32, 'must have 32 characters or more'),
    DATABASE_URL: z.url({ protocol: /^(mysql|mariadb)$/ }),
    /** Unset for Amazon's own service. */
    S3_ENDPOINT: z.url({ protocol: /^https?$/ }).optional(),
    S3_REGION: z.string().default('us-east-1'),
    S3_BUCKET: z.string(),
    /** Both or neither; with neither the machine's own role is used. */
    S3_ACCESS_KEY_ID: z.string().optional(),
    S3_SECRET_ACCESS_KEY: z.string().optional(),
    S3_FORCE_PATH_STYLE: z.stringbool().default(false),
    SMTP_URL: z.url({ protocol: /^smtps?$/ }),
    MAIL_FROM: z.string(),
    /** The listing of the local mail sink; unset in production, and then /mail-sink does not exist. */
    MAIL_SINK_URL: z.url({ protocol: /^https?$/ }).optional(),
    /** Sign-in through an OpenID provider: issuer, client and secret, or none of them. */
    OIDC_ISSUER: z.url().optional(),
    OIDC_CLIENT_ID: z.string().optional(),
    OIDC_CLIENT_SECRET: z.string().optional(),
    OIDC_NAME: z.string().default('Single sign-on'),
    LOG_LEVEL: z.enum(LOG_LEVELS).default('info'),
  })
  .superRefine((names, context) => {
    checkTogether(names, ['S3_ACCESS_KEY_ID', 'S3_SECRET_ACCESS_KEY'], context);
    checkTogether(names, ['OIDC_ISSUER', 'OIDC_CLIENT_ID', 'OIDC_CLIENT_SECRET'], context);
  });

function checkTogether<Name extends string>(
  names: Readonly<Partial<Record<Name, string>>>,
  group: readonly Name[],
  context: z.RefinementCtx,
): void {
  const missing = group.filter((name) => names[name] === undefined);
  if (missing.length === 0 || missing.length === group.length) return;
  for (const name of missing) {
    context.addIssue({ code: 'custom', path: [name], message: `must be set along with ${group.join(', ')}` });
  }
}

type Environment = z.output<typeof environment>;

export interface StoreConfig {
  readonly endpoint: string | null;
  readonly region: string;
  readonly bucket: string;
  /** Null: the machine's own role. */
  readonly credentials: { readonly accessKeyId: string; readonly secretAccessKey: string } | null;
  readonly forcePathStyle: boolean;
}

export interface OidcConfig {
  readonly name: string;
  readonly issuer: string;
  readonly clientId: string;
  readonly clientSecret: string;
}

export interface MailConfig {
  readonly smtpUrl: string;
  readonly from: string;
  readonly sinkUrl: string | null;
}

export interface Config {
  readonly environment: Environment['NODE_ENV'];
  /** Scheme, host and port, no trailing slash. */
  readonly appUrl: string;
  readonly authSecret: string;
  readonly databaseUrl: string;
  readonly store: StoreConfig;
  readonly mail: MailConfig;
  readonly oidc: OidcConfig | null;
  readonly logLevel: Environment['LOG_LEVEL'];
}

function storeOf(names: Environment): StoreConfig {
  const { S3_ACCESS_KEY_ID: accessKeyId, S3_SECRET_ACCESS_KEY: secretAccessKey } = names;
  return Object.freeze({
    endpoint: names.S3_ENDPOINT ?? null,
    region: names.S3_REGION,
    bucket: names.S3_BUCKET,
    credentials: accessKeyId && secretAccessKey ? Object.freeze({ accessKeyId, secretAccessKey }) : null,
    forcePathStyle: names.S3_FORCE_PATH_STYLE,
  });
}

function oidcOf(names: Environment): OidcConfig | null {
  const { OIDC_ISSUER: issuer, OIDC_CLIENT_ID: clientId, OIDC_CLIENT_SECRET: clientSecret } = names;
  if (!issuer || !clientId || !clientSecret) return null;
  return Object.freeze({ name: names.OIDC_NAME, issuer, clientId, clientSecret });
}

function configOf(names: Environment): Config {
  return Object.freeze({
    environment: names.NODE_ENV,
    appUrl: names.APP_URL,
    authSecret: names.NEXTAUTH_SECRET,
    databaseUrl: names.DATABASE_URL,
    store: storeOf(names),
    mail: Object.freeze({
      smtpUrl: names.SMTP_URL,
      from: names.MAIL_FROM,
      sinkUrl: names.MAIL_SINK_URL ?? null,
    }),
    oidc: oidcOf(names),
    logLevel: names.LOG_LEVEL,
  });
}

/** Names and what is wrong with them, never a value: values are secrets. */
export class ConfigError extends Error {
  override readonly name = 'ConfigError';
}

function formatIssue(issue: z.core.$ZodIssue, isSet: boolean): string {
  const name = issue.path.join('.');
  if (!isSet && issue.code !== 'custom') return `  ${name} is not set`;
  return `  ${name}: ${issue.message}`;
}

/** Parses an environment; throws a ConfigError that lists every name at fault. */
export function parseConfig(variables: Readonly<Record<string, string | undefined>>): Config {
  const set = Object.fromEntries(Object.entries(variables).filter(([, value]) => value !== undefined && value !== ''));
  const parsed = environment.safeParse(set);
  if (parsed.success) return configOf(parsed.data);
  const lines = parsed.error.issues.map((issue) => formatIssue(issue, String(issue.path[0]) in set));
  throw new ConfigError(`The environment is not complete:\n${lines.join('\n')}`);
}

let config: Config | undefined;

/** The configuration of this process. */
export function getConfig(): Config {
  if (config) return config;
  config = parseConfig(process.env);
  // next-auth reads its own address from the environment and nowhere else.
  process.env.NEXTAUTH_URL = config.appUrl;
  return config;
}

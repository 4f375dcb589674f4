// The one place that reads the environment. Everything has a default but secrets, and those are made at first start
// and kept in the data folder, readable by the owner alone.
import { randomBytes } from "node:crypto";
import { mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { join, resolve } from "node:path";
import { pathToFileURL } from "node:url";
import { z } from "zod";

const port = (fallback: number) => z.coerce.number().int().min(0).max(65535).default(fallback);

const Environment = z.object({
  NODE_ENV: z.enum(["development", "test", "production"]).default("development"),
  DATA_DIR: z.string().min(1).default("data"),
  DATABASE_URL: z.string().min(1).optional(),
  DATABASE_AUTH_TOKEN: z.string().min(1).optional(),
  HOST: z.string().min(1).default("127.0.0.1"),
  PORT: port(3000),
  APP_ORIGIN: z.url({ protocol: /^https?$/, error: "APP_ORIGIN must be a web address such as https://board.example" }).optional(),
  TRUST_PROXY: z.enum(["0", "1"]).default("0"),
  LOG_LEVEL: z.enum(["silent", "error", "warn", "info", "debug"]).optional(),
  SMTP_HOST: z.string().min(1).default("127.0.0.1"),
  SMTP_PORT: port(2525),
  SMTP_SECURE: z.enum(["0", "1"]).default("0"),
  SMTP_USER: z.string().min(1).optional(),
  SMTP_PASSWORD: z.string().min(1).optional(),
  S3_BUCKET: z.string().min(3).optional(),
  S3_REGION: z.string().min(1).default("us-east-1"),
  S3_ENDPOINT: z.url({ protocol: /^https?$/, error: "S3_ENDPOINT must be a web address such as https://s3.example" }).optional(),
  S3_ACCESS_KEY_ID: z.string().min(1).optional(),
  S3_SECRET_ACCESS_KEY: z.string().min(1).optional(),
  MAIL_FROM: z.string().min(3).default("Bladecount <board@bladecount.example>"),
});

export type Env = ReturnType<typeof readEnv>;

/** Reads and checks settings. Throws one error that names each setting at fault. */
export function readEnv(source: Record<string, string | undefined>) {
  const parsed = Environment.safeParse(source);
  if (!parsed.success) {
    const faults = parsed.error.issues.map((issue) => `${issue.path.join(".")}: ${issue.message}`);
    throw new Error(`Settings cannot be used. ${faults.join("; ")}`);
  }
  const e = parsed.data;
  const dataFolder = resolve(e.DATA_DIR);
  if (e.S3_BUCKET && !(e.S3_ACCESS_KEY_ID && e.S3_SECRET_ACCESS_KEY))
    throw new Error("Settings cannot be used. S3_BUCKET needs S3_ACCESS_KEY_ID and S3_SECRET_ACCESS_KEY beside it");
  const origin = e.APP_ORIGIN ? new URL(e.APP_ORIGIN).origin : undefined;
  return Object.freeze({
    mode: e.NODE_ENV,
    dataFolder,
    databaseUrl: e.DATABASE_URL ?? pathToFileURL(join(dataFolder, "bladecount.db")).href,
    databaseAuthToken: e.DATABASE_AUTH_TOKEN,
    host: e.HOST,
    port: e.PORT,
    /** The public address when a proxy in front ends TLS, such as https://board.example; else undefined. */
    appOrigin: origin,
    /** What links in mail begin with. */
    baseUrl: origin ?? `http://${e.HOST}:${e.PORT}`,
    https: origin?.startsWith("https:") ?? false,
    /** True when the proxy in front sets X-Forwarded-For; else that header is ignored, for anyone can send it. */
    trustProxy: e.TRUST_PROXY === "1",
    logLevel: e.LOG_LEVEL ?? (e.NODE_ENV === "test" ? "silent" : "info"),
    smtp: { host: e.SMTP_HOST, port: e.SMTP_PORT, secure: e.SMTP_SECURE === "1", user: e.SMTP_USER, password: e.SMTP_PASSWORD },
    mailFrom: e.MAIL_FROM,
    /** Where photos and logs are kept; undefined = in the data folder. */
    bucket: e.S3_BUCKET
      ? {
          bucket: e.S3_BUCKET,
          region: e.S3_REGION,
          endpoint: e.S3_ENDPOINT,
          accessKeyId: e.S3_ACCESS_KEY_ID ?? "",
          secretAccessKey: e.S3_SECRET_ACCESS_KEY ?? "",
        }
      : undefined,
    /** bcrypt's cost. 12 takes about 0.25 s; tests hash often and protect nobody. */
    hashCost: e.NODE_ENV === "test" ? 4 : 12,
  });
}

export const env: Env = readEnv(process.env);

/** A secret of this instance by name, made at first use: 256 random bits as hex, in `secrets/<name>` of the data folder, mode 600. */
export function secret(name: "addresses" | "links", folder = env.dataFolder): string {
  const file = join(folder, "secrets", name);
  mkdirSync(join(folder, "secrets"), { recursive: true, mode: 0o700 });
  try {
    // "wx" fails when the file is there, so two processes that start together agree on one secret.
    writeFileSync(file, randomBytes(32).toString("hex"), { mode: 0o600, flag: "wx" });
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== "EEXIST") throw error;
  }
  return readFileSync(file, "utf8");
}

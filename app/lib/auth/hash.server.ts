// bcrypt at cost 12 takes a quarter of a second of pure JavaScript: it runs in a worker thread, one job after the other, so
// that a sign-in never stalls a tick.
import { createRequire } from "node:module";
import { Worker } from "node:worker_threads";
import { env } from "#app/lib/env.server";

// Given as text so that it runs the same from the source tree and from the bundle.
const source = `
const { parentPort, workerData } = require("node:worker_threads");
const bcrypt = require(workerData.bcrypt);
parentPort.on("message", ({ id, text, hash, cost }) => {
  try {
    parentPort.postMessage({ id, value: hash === undefined ? bcrypt.hashSync(text, cost) : bcrypt.compareSync(text, hash) });
  } catch (error) {
    parentPort.postMessage({ id, error: error.message });
  }
});`;

type Job = { resolve: (value: string | boolean) => void; reject: (error: Error) => void };
const jobs = new Map<number, Job>();
let worker: Worker | undefined;
let lastId = 0;

function hired(): Worker {
  if (worker) return worker;
  const bcrypt = createRequire(import.meta.url).resolve("bcryptjs");
  const hiring = new Worker(source, { eval: true, workerData: { bcrypt } });
  hiring.on("message", ({ id, value, error }: { id: number; value: string | boolean; error?: string }) => {
    const job = jobs.get(id);
    jobs.delete(id);
    if (jobs.size === 0) hiring.unref();
    if (error === undefined) job?.resolve(value);
    else job?.reject(new Error(error));
  });
  hiring.on("error", (error) => {
    worker = undefined;
    for (const job of jobs.values()) job.reject(error);
    jobs.clear();
  });
  worker = hiring;
  return hiring;
}

function run(job: { text: string; hash?: string; cost?: number }): Promise<string | boolean> {
  return new Promise((resolve, reject) => {
    const id = ++lastId;
    jobs.set(id, { resolve, reject });
    const on = hired();
    on.ref();
    on.postMessage({ id, ...job });
  });
}

/** bcrypt reads no further than this many bytes of its input. */
export const mostBytes = 72;

export const fits = (text: string): boolean => new TextEncoder().encode(text).length <= mostBytes;

/** Hashes a password or PIN of at most 72 bytes. Throws on a longer one: bcrypt would ignore the rest of it. */
export async function hash(text: string): Promise<string> {
  if (!fits(text)) throw new Error("Longer than bcrypt reads");
  return String(await run({ text, cost: env.hashCost }));
}

/** True when `text` was what `hashed` was made of. */
export async function matches(text: string, hashed: string): Promise<boolean> {
  return fits(text) && (await run({ text, hash: hashed })) === true;
}

let nobody: Promise<string> | undefined;

/** Takes as long as `matches` and is never true: for accounts that do not exist. */
export async function matchesNobody(text: string): Promise<false> {
  nobody ??= hash("no account has this password");
  await matches(fits(text) ? text : "", await nobody);
  return false;
}

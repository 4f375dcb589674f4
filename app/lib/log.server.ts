// The log: one JSON line an event on standard output, times in UTC. Never form bodies, tokens, names or addresses:
// people appear by their id. JSON quotes line ends, so nothing that a visitor sends can start a line of its own.
import { type Logger, pino } from "pino";
import { env } from "#app/lib/env.server";

export const log: Logger = pino({
  level: env.logLevel,
  base: { app: "bladecount" },
  timestamp: pino.stdTimeFunctions.isoTime,
  formatters: { level: (label) => ({ level: label }) },
});

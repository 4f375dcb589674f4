// The demo's calendar: its past is told in days before today and in minutes before now, on the clocks of the place.
import { instantOfLocal, localOf } from "#app/lib/gates/local-time";

const DAY = 86_400_000;

/** Far enough apart that at each hour it is a working day in one of them: a demo begun at night would have its run in the dark. */
const ZONES = ["Europe/Zurich", "America/Denver", "Pacific/Auckland", "Australia/Perth"];

/** The first of them in which it is between 10:00 and 18:00 at that instant. */
export function workingZone(at: number): string {
  const zone = ZONES.find((z) => {
    const { time } = localOf(at, z);
    return time >= "10:00" && time < "18:00";
  });
  return zone ?? "UTC";
}

/** The instant at which clocks there showed `time` that many days before the day of `today`. */
export function daysBefore(today: number, days: number, time: string, zone: string): number {
  const { date } = localOf(today, zone);
  const day = new Date(Date.parse(`${date}T00:00:00Z`) - days * DAY).toISOString().slice(0, 10);
  const found = instantOfLocal(day, time, zone);
  if (!found.ok) throw new Error(found.sentence);
  return found.at;
}

/** That many days after the day of `today`, as people write it: "2027-01-31". */
export const dateAfter = (today: number, days: number, zone: string): string => localOf(today + days * DAY, zone).date;

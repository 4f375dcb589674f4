import { describe, expect, it } from "vitest";
import { endOfDate, endOfDay, instantOfLocal, localOf } from "#app/lib/gates/local-time";

// Rules of the zones: IANA time zone database.

describe("local time at the install", () => {
  const zone = "Europe/Berlin";
  it.each([
    ["2026-12-05", "09:30", Date.UTC(2026, 11, 5, 8, 30)],
    ["2026-07-04", "9:30", Date.UTC(2026, 6, 4, 7, 30)],
    ["2027-03-28", "01:59", Date.UTC(2027, 2, 28, 0, 59)],
    ["2027-03-28", "03:00", Date.UTC(2027, 2, 28, 1, 0)],
    ["2026-10-25", "03:00", Date.UTC(2026, 9, 25, 2, 0)],
    ["2026-10-25", "01:59", Date.UTC(2026, 9, 24, 23, 59)],
  ])("%s %s is one instant, and comes back as typed", (date, time, at) => {
    expect(instantOfLocal(date, time, zone)).toEqual({ ok: true, at });
    expect(localOf(at, zone)).toEqual({ date, time: time.padStart(5, "0") });
  });
  it.each([
    ["2027-03-28", "02:30", "time", "There is no 02:30 on that day"],
    ["2026-10-25", "02:30", "time", "comes twice on that day"],
    ["2026-02-30", "09:30", "date", "There is no 2026-02-30"],
    ["5.12.2026", "09:30", "date", "year-month-day"],
    ["2026-12-05", "24:00", "time", "hours and minutes"],
  ])("%s %s is refused with what to type instead", (date, time, field, words) => {
    const read = instantOfLocal(date, time, zone);
    expect(read).toMatchObject({ ok: false, field });
    expect(!read.ok && read.sentence).toContain(words);
  });
  it("knows half-hour changes", () => {
    expect(instantOfLocal("2026-10-04", "02:15", "Australia/Lord_Howe")).toMatchObject({ ok: false, field: "time" });
    expect(instantOfLocal("2026-10-04", "02:45", "Australia/Lord_Howe")).toEqual({ ok: true, at: Date.UTC(2026, 9, 3, 15, 45) });
  });
  it("takes seconds, and gives the day there, not at Greenwich", () => {
    expect(instantOfLocal("2026-07-03", "14:10:30", zone)).toEqual({ ok: true, at: Date.UTC(2026, 6, 3, 12, 10, 30) });
    expect(localOf(Date.UTC(2026, 11, 3, 23, 30, 1, 7), zone)).toEqual({ date: "2026-12-04", time: "00:30" });
  });
});

describe("the end of a day at the install", () => {
  it.each([
    ["Europe/Berlin", "2026-12-03", Date.UTC(2026, 11, 3, 23)],
    // 23 and 25 hours long
    ["Europe/Berlin", "2027-03-28", Date.UTC(2027, 2, 28, 22)],
    ["Europe/Berlin", "2026-10-25", Date.UTC(2026, 9, 25, 23)],
    ["Pacific/Auckland", "2026-12-03", Date.UTC(2026, 11, 3, 11)],
    ["America/Denver", "2026-12-03", Date.UTC(2026, 11, 4, 7)],
    // Clocks went from 24:00 to 01:00: the next day had no midnight.
    ["America/Sao_Paulo", "2018-11-03", Date.UTC(2018, 10, 4, 3)],
    // Clocks went from 24:00 to 23:00: the day ends when midnight comes for good.
    ["America/Sao_Paulo", "2018-02-17", Date.UTC(2018, 1, 18, 3)],
  ])("in %s of %s", (timeZone, date, at) => {
    expect(endOfDate(date, timeZone)).toBe(at);
    expect(endOfDay(at - 1, timeZone)).toBe(at);
    expect(localOf(at - 1, timeZone).date).toBe(date);
    expect(localOf(at, timeZone).date > date).toBe(true);
  });
  it("is not there for a date that is none", () => {
    expect(endOfDate("2026-02-30", "UTC")).toBeNull();
    expect(endOfDate("3.12.2026", "UTC")).toBeNull();
  });
  it("throws on a zone that is none", () => expect(() => endOfDay(0, "Mars/Olympus")).toThrow(RangeError));
});

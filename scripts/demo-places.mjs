// Where things are on a seeded demo: ids by what people call them, read from the database file, so that tests and screenshots can
// name a place without walking to it.
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { createClient } from "@libsql/client";

/**
 * @typedef {object} DemoPlace
 * @property {string} id
 * @property {Record<string, string>} gates ids by key ("WR", "PO 1")
 * @property {Record<string, string>} items ids by key ("WR8"); an item of a post-run gate by gate and key ("PO 1 PO2")
 * @property {Record<string, string>} runs ids by label
 */

/**
 * @param {string} folder the data folder
 * @returns {Promise<Record<string, DemoPlace>>} by registration
 */
export async function demoPlaces(folder) {
  const client = createClient({ url: pathToFileURL(join(folder, "bladecount.db")).href });
  const rows = async (sql) => (await client.execute(sql)).rows;
  /** @type {Record<string, DemoPlace>} */
  const places = {};
  const byId = new Map();
  for (const { id, registration } of await rows("SELECT id, registration FROM installs")) {
    const place = { id: String(id), gates: {}, items: {}, runs: {} };
    places[String(registration)] = place;
    byId.set(id, place);
  }
  const gateKeys = new Map();
  for (const { id, install_id, key } of await rows("SELECT id, install_id, key FROM gates")) {
    byId.get(install_id).gates[String(key)] = String(id);
    gateKeys.set(id, String(key));
  }
  for (const { id, install_id, gate_id, key } of await rows("SELECT id, install_id, gate_id, key FROM items")) {
    const gate = gateKeys.get(gate_id) ?? "";
    byId.get(install_id).items[gate.includes(" ") ? `${gate} ${key}` : String(key)] = String(id);
  }
  for (const { id, install_id, label } of await rows("SELECT id, install_id, label FROM runs"))
    byId.get(install_id).runs[String(label)] = String(id);
  client.close();
  return places;
}

/**
 * A board as a template of one's own: what it asks, by keys, without anybody's records. Numbers come along as starting points; where
 * they were read does not, for that was another engine's paper.
 */
import type { GateDef, GeneratedBoard, ItemDef, Traits, ValueKey } from "#app/lib/template/types";

export const OWN_TEMPLATE_SCHEMA = "bladecount.board-template";
export const OWN_TEMPLATE_VERSION = 1;

export interface OwnTemplate {
  schema: typeof OWN_TEMPLATE_SCHEMA;
  version: typeof OWN_TEMPLATE_VERSION;
  name: string;
  /** Of the built-in template from which the board came. */
  templateVersion: string;
  /** Answers about the install that the board was made for, and the ratings that its counts and bands follow from, SI. */
  traits: Traits;
  values: Partial<Record<ValueKey, number>>;
  gates: (GateDef & { hidden: boolean })[];
  items: (ItemDef & { hidden: boolean })[];
  postRun: GeneratedBoard["postRun"];
}

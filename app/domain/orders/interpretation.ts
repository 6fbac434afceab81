import { z } from "zod";

/**
 * What the builder says a set of drawings means. Editable, with history, until the order is quoted; then frozen
 * into a revision.
 */
const depthSchema = z
  .union([z.object({ depth: z.number().positive() }), z.object({ leave: z.number().positive() })])
  .nullable();

export const layerRuleSchema = z.object({
  layer: z.string(),
  kind: z.enum(["outside", "cut-through", "pocket", "drill", "engrave", "set-aside"]),
  depth: depthSchema,
});

export const fileInterpretationSchema = z.object({
  sha256: z.string().regex(/^[0-9a-f]{64}$/),
  /** What the file's coordinates are in; null until the builder has confirmed it. */
  unit: z.enum(["mm", "cm", "m", "in", "ft"]).nullable(),
  layers: z.array(layerRuleSchema),
  /** Stock of every part in this file; null until chosen. */
  materialId: z.string().nullable(),
  lotId: z.string().nullable(),
  /** How many of everything in this file. */
  sets: z.number().int().min(1).max(999),
});

export const SANDING_LEVELS = ["none", "arrises", "grit-150"] as const;
export const sandingSchema = z.enum(SANDING_LEVELS);
export type Sanding = z.infer<typeof sandingSchema>;

export const partChoiceSchema = z.object({
  sha256: z.string(),
  letter: z.string(),
  name: z.string().trim().max(60).nullable(),
  grain: z.enum(["along-x", "along-y", "free"]),
});

export const interpretationSchema = z.object({
  files: z.array(fileInterpretationSchema),
  /** Only parts that differ from the defaults (own letter as name, grain along X as drawn). */
  parts: z.array(partChoiceSchema),
  sanding: sandingSchema,
  /** Tabs are cut off and their stubs sanded unless the builder leaves them on. */
  leaveTabs: z.boolean(),
});
export type Interpretation = z.infer<typeof interpretationSchema>;
export type FileInterpretation = z.infer<typeof fileInterpretationSchema>;

import { z } from 'zod';

export const documentFormat = 1;

/** A node as JSON, before it is known to fit the schema. */
export type NodeJson = {
  type: string;
  attrs?: Record<string, unknown>;
  content?: NodeJson[];
  marks?: { type: string; attrs?: Record<string, unknown> }[];
  text?: string;
};

const nodeSchema: z.ZodType<NodeJson> = z.lazy(() =>
  z.strictObject({
    type: z.string(),
    attrs: z.record(z.string(), z.unknown()).optional(),
    content: z.array(nodeSchema).optional(),
    marks: z
      .array(z.strictObject({ type: z.string(), attrs: z.record(z.string(), z.unknown()).optional() }))
      .optional(),
    text: z.string().optional(),
  }),
) as z.ZodType<NodeJson>;

/** The wire form of a document; `checkDocument` says whether it fits the schema. */
export const documentSchema = nodeSchema;

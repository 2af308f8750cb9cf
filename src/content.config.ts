import { glob } from 'astro/loaders';
import { defineCollection, z } from 'astro:content';

/** Guides for the work itself: scoring, cutting, gluing, choosing card. One MDX file each. */
const handbook = defineCollection({
  loader: glob({ base: './content/handbook', pattern: '*.mdx' }),
  schema: z.object({
    /** As a reader would ask for it: "Reading a measurement sheet". */
    title: z.string().min(3).max(60),
    /** One sentence for the index, search engines and links. */
    description: z.string().min(20).max(180),
    /** Place in the index; the lowest comes first. */
    order: z.number().int().positive(),
    /** Slug of the pattern whose figures and drawings the guide shows, unless a figure names another. */
    pattern: z.string().regex(/^[a-z0-9-]+$/),
    /** The piece whose drawing stands for the guide in the index. */
    piece: z.string(),
    /** Asked measures that the form beside the guide puts to the reader. */
    ask: z.array(z.string()).min(1).max(6),
  }),
});

/** What a box is, how it works and what limits it: one MDX file for each pattern, named by the pattern's slug. */
const boxes = defineCollection({
  loader: glob({ base: './content/handbook/boxes', pattern: '*.mdx' }),
  schema: z.strictObject({
    /** One sentence for the head of the page, search engines and links: what the box is and what it is good for. */
    description: z.string().min(20).max(180),
    /** Asked measures that the form beside the entry puts to the reader. */
    ask: z.array(z.string()).min(1).max(6),
    /** Choices that the form offers. */
    choose: z.array(z.string()).max(5).default([]),
  }),
});

export const collections = { handbook, boxes };

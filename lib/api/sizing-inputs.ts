/** What the API takes for sizing and trying sections. */
import { z } from 'zod';
import { roles } from '@/lib/model/frame';
import { rangeNames } from '@/lib/sections/library';
import { batchRange, mostGroups, officeRange, sizedBy } from '@/lib/sizing/sizing';

const ranges = [...rangeNames, officeRange, batchRange] as const;
const depth = z
  .number({ error: 'Give a depth in metres as a number.' })
  .min(0, 'A depth is 0 or more.')
  .max(10, 'Give a depth of at most 10 m.')
  .nullable()
  .default(null);

const sizingGroup = z
  .strictObject({
    by: z.enum(sizedBy, { error: `Say by what members are one group: ${sizedBy.join(', ')}.` }),
    name: z.string({ error: 'Name the members.' }).trim().min(1, 'Name the members.').max(200),
    range: z.enum(ranges, { error: `Choose a range of sections: ${ranges.join(', ')}.` }),
    /** Metres. */
    minDepth_m: depth,
    maxDepth_m: depth,
  })
  .refine(({ by, name }) => by !== 'role' || roles.some((role) => role === name), `Roles are ${roles.join(', ')}.`)
  .refine(({ minDepth_m, maxDepth_m }) => (minDepth_m ?? 0) <= (maxDepth_m ?? Infinity), 'The smallest depth is above the largest.'); // prettier-ignore

/** Groups of members, each with the range that its section is looked for in. */
export const sizingInput = z.object({
  groups: z
    .array(sizingGroup, { error: 'List the groups of members.' })
    .min(1, 'Choose at least one group of members.')
    .max(mostGroups, `Size at most ${mostGroups} groups at once.`)
    .refine((list) => new Set(list.map(({ by, name }) => `${by} ${name}`)).size === list.length, 'Size each group once.'),
});

/** A section as members of a frame would have it, of each of its materials. */
export const sectionInput = z.object({
  name: z.string({ error: 'Name a section: ?name=IPE 300.' }).trim().min(1, 'Name a section: ?name=IPE 300.').max(200),
  of: z.array(z.string().min(1).max(300)).min(1, 'Name a material: &of=S275.').max(20, 'Name at most 20 materials.'),
});

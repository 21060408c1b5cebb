/**
 * The categories of appliances that the leak repair rules tell apart. A person chooses one with the law's
 * definitions in sight (language file, `rules.categories`); the product never decides it.
 *
 * @see 40 CFR 82.152 and 84.102
 */
export const CATEGORIES = ['comfort-cooling', 'commercial', 'industrial-process', 'other'] as const
export type Category = (typeof CATEGORIES)[number]

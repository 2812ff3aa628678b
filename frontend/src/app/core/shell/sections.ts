/** The sections of a study, in the order of the index tabs. */
export const SECTIONS = [
  { path: 'overview', label: 'Overview' },
  { path: 'requirements', label: 'Requirements' },
  { path: 'product-tree', label: 'Product tree' },
  { path: 'quantities', label: 'Quantities' },
  { path: 'analyses', label: 'Analyses' },
  { path: 'compliance', label: 'Compliance' },
  { path: 'changes', label: 'Changes' },
  { path: 'baselines', label: 'Baselines' },
  { path: 'records', label: 'Records' },
] as const;

/** The section that an address lies in, or undefined outside a study. */
export function sectionOf(url: string): (typeof SECTIONS)[number] | undefined {
  const path = /^\/studies\/[^/?#]+\/([^/?#]+)/.exec(url)?.[1];
  return SECTIONS.find((section) => section.path === path);
}

/** Shows an SI number in a unit; the pages pass the person's unit preferences. */
export type ShowNumber = (
  si: number,
  unit: string,
  options?: { readonly temperature?: 'absolute' | 'difference' },
) => string;

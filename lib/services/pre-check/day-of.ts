/** The day a moment lies in, on the wall clock of the machine that keeps the site's time. */
export function dayOf(moment: Date): { readonly from: Date; readonly before: Date } {
  const [year, month, day] = [moment.getFullYear(), moment.getMonth(), moment.getDate()];
  return { from: new Date(year, month, day), before: new Date(year, month, day + 1) };
}

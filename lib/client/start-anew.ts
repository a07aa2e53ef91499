/**
 * Goes to an address with a whole page load: who is signed in, or in which team, has changed, and every layout
 * and every answer kept in this page belongs to what was before.
 */
export function startAnew(address: string): void {
  window.location.assign(address);
}

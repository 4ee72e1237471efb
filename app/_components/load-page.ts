/** Goes to a page by loading it anew: after a session began or ended, nothing of before may stay in the router's memory. */
export function loadPage(path: string): void {
  window.location.assign(path);
}

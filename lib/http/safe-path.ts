/** Where to go after signing in: a path of our own, never another site (`//host`, `/\host`, `https:`). */
export function safePath(wanted: string | undefined): string {
  return wanted && /^\/(?![/\\])[^\p{Cc}]*$/u.test(wanted) ? wanted : '/';
}

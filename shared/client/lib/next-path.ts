/** Where to go after sign-in: only addresses of this site, never one that a link from elsewhere smuggles in. */
export function safeNextPath(next: string | string[] | undefined): string {
  const path = Array.isArray(next) ? next[0] : next;
  const isOwn = path !== undefined && OWN_PATH.test(path) && !path.startsWith('/sign-in');
  return isOwn ? path : '/home';
}

/** One slash at the head; no control characters, which browsers drop: `/<tab>/elsewhere` would be another site. */
const OWN_PATH = /^\/(?![/\\])[^\u0000-\u001f\u007f]*$/;

/** The address the browser shows now, to come back to. */
export function currentPath(): string {
  const { pathname, search } = globalThis.location ?? { pathname: '/', search: '' };
  return pathname + search;
}

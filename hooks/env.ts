/** Where the API answers: the page's own origin in the browser, the server's own address while it renders a page. */
export function apiOrigin(): string {
  return typeof window === 'undefined' ? (process.env.API_ORIGIN ?? 'http://127.0.0.1:8080') : '';
}

/** The shop's address as people type and share it. Asked for on the server only, while a page renders. */
export function publicOrigin(): string {
  return (process.env.PUBLIC_ORIGIN ?? 'http://127.0.0.1:8080').replace(/\/$/, '');
}

/** Where the API answers: the page's own origin in the browser, the server's own address while it renders a page. */
export function apiOrigin(): string {
  return typeof window === 'undefined' ? (process.env.API_ORIGIN ?? 'http://127.0.0.1:8080') : '';
}

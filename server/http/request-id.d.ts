declare namespace Express {
  // Express's own type is open for this: each request carries the id that its log lines and its answer name.
  // eslint-disable-next-line @typescript-eslint/consistent-type-definitions -- declaration merging needs an interface
  interface Request {
    id: string;
  }
}

type Option = { value: string; label: string };
type Named = { id: string; name: string };

/** All that may stand on a butcher's price list: what leaves whole, then the cuts. */
export function productOptions(specification: Record<string, unknown> | undefined, cuts: readonly Named[]): Option[] {
  const quarters = (specification?.quarters ?? []) as { primals: Named[] }[];
  return [
    { value: 'side', label: 'Side' },
    { value: 'fore', label: 'Forequarter' },
    { value: 'hind', label: 'Hindquarter' },
    ...quarters.flatMap(({ primals }) =>
      primals.map(({ id, name }) => ({ value: `primal:${id}`, label: `${name}, whole` })),
    ),
    ...cuts.map(({ id, name }) => ({ value: `cut:${id}`, label: name })),
  ];
}

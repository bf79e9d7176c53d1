type Seller = { businessName: string; addressLines: readonly string[] };

/** `Skelderwick Farm, Under Rigg, ZZ1 1AA`: a farm's address often begins with its name. */
export function sellerWords({ businessName, addressLines }: Seller): string {
  return [businessName, ...addressLines.filter((line) => line !== businessName)].join(', ');
}

import type { Box } from '#shared/contracts/shop.ts';

/** The box as search engines read it: price, and whether any day still has one. */
export function BoxJsonLd({ box, farmName }: { box: Box; farmName: string }) {
  const isLeft = box.offers.some(
    (offer) => offer.free > 0 && box.days.some((day) => day.isInTime && day.id === offer.dayId),
  );
  const facts = {
    '@context': 'https://schema.org',
    '@type': 'Product',
    name: `${box.name} beef box`,
    description: box.summary,
    sku: box.slug,
    brand: { '@type': 'Brand', name: farmName },
    weight: { '@type': 'QuantitativeValue', value: box.guaranteedGrams / 1000, unitCode: 'KGM' },
    offers: {
      '@type': 'Offer',
      price: (box.pricePence / 100).toFixed(2),
      priceCurrency: 'GBP',
      availability: `https://schema.org/${isLeft ? 'InStock' : 'SoldOut'}`,
    },
  };
  // `<` would let a name in the data end the script.
  const json = JSON.stringify(facts).replaceAll('<', '\\u003c');
  return <script type="application/ld+json" dangerouslySetInnerHTML={{ __html: json }} />;
}

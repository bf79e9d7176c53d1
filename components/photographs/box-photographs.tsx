import { View } from 'react-native';
import type { Photograph } from '#shared/contracts/photographs.ts';
import { css } from '#components/theme/css.ts';

/** Its width and height stand in the page, so that nothing moves when a picture arrives. */
export function PhotographImage({ photograph }: { photograph: Photograph }) {
  const { href, width, height, alt } = photograph;
  return (
    <img
      src={href}
      width={width}
      height={height}
      alt={alt}
      loading="lazy"
      decoding="async"
      style={{ maxWidth: '100%', height: 'auto' }}
    />
  );
}

/** The farm's own pictures of a box. Until there are any, the drawings of its cuts stand alone. */
export function BoxPhotographs({ photographs }: { photographs: readonly Photograph[] }) {
  if (photographs.length === 0) return null;
  return (
    <View style={css('w-stack')}>
      {photographs.map((photograph) => (
        <PhotographImage key={photograph.id} photograph={photograph} />
      ))}
    </View>
  );
}

import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';

/** Something that should not happen, or a lost line on the way to another page. */
export function PageBroken({ onRetry }: { onRetry: () => void }) {
  return (
    <View role="main" id="main" style={css('w-page', 'w-main')}>
      <EmptyState
        level={1}
        title="This page did not open"
        words="There may be no connection. Your basket and whatever you saved are kept."
      >
        <Button label="Try again" onPress={onRetry} />
      </EmptyState>
    </View>
  );
}

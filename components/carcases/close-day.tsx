import { useState } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Sheet } from '#components/ui/sheet.tsx';
import { Text } from '#components/ui/text.tsx';

type CloseDayProps = { busy: boolean; onClose: () => Promise<unknown>; error: Error | null };

/** Closing cannot be taken back, so it is asked twice. */
export function CloseDay({ busy, onClose, error }: CloseDayProps) {
  const [isAsking, setAsking] = useState(false);
  const close = async () => {
    // A refusal stays with the button, which says what the day still waits for.
    await onClose().catch(() => undefined);
    setAsking(false);
  };
  return (
    <View style={css('w-stack', 'w-ruled')}>
      <View style={css('w-buttons')}>
        <Button kind="quiet" label="Close this day" onPress={() => setAsking(true)} />
      </View>
      <ProblemNotice error={error} title="The day was not closed." />
      <Sheet
        open={isAsking}
        onClose={() => setAsking(false)}
        title="Close this day?"
        actions={
          <>
            <Button label="Close the day" busy={busy} onPress={() => void close()} />
            <Button kind="quiet" label="Not yet" onPress={() => setAsking(false)} />
          </>
        }
      >
        <Text>
          Every order has to be filled or settled and every gram have its place. A closed day keeps its weights, orders
          and plan for good.
        </Text>
      </Sheet>
    </View>
  );
}

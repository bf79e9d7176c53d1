import { useState } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Sheet } from '#components/ui/sheet.tsx';
import { Text } from '#components/ui/text.tsx';

type RetireAndRestoreProps = {
  isRetired: boolean;
  /** It descends from a specification that came with the program. */
  canRestore: boolean;
  busy: boolean;
  onRetire: (isRetired: boolean) => void;
  onRestore: () => void;
};

/** What touches all editions of a name. Going back to the shipped figures is asked about once more. */
export function RetireAndRestore({ isRetired, canRestore, busy, onRetire, onRestore }: RetireAndRestoreProps) {
  const [isAsking, setAsking] = useState(false);
  const restore = () => {
    setAsking(false);
    onRestore();
  };
  return (
    <View style={css('w-buttons')}>
      {canRestore ? (
        <Button kind="quiet" label="Back to the shipped figures" busy={busy} onPress={() => setAsking(true)} />
      ) : null}
      <Button
        kind="quiet"
        label={isRetired ? 'Offer it for new days again' : 'Retire this specification'}
        busy={busy}
        onPress={() => onRetire(!isRetired)}
      />
      <Sheet
        open={isAsking}
        onClose={() => setAsking(false)}
        title="Back to the shipped figures?"
        actions={<Button label="Make that the next edition" onPress={restore} />}
      >
        <Text>
          The figures that came with the program become the next edition. Yours stay in the editions before it, and what
          was learned starts afresh.
        </Text>
      </Sheet>
    </View>
  );
}

import { useState } from 'react';
import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { Sheet } from '#components/ui/sheet.tsx';
import { Text } from '#components/ui/text.tsx';

type ClosingProps = {
  onAsk: () => void;
  isAsking: boolean;
  /** The address that the link went to, once it has. */
  sentTo: string | undefined;
  refusal: string | undefined;
};

/** Asked once more here, and again by mail: whoever finds an open browser cannot close the account. */
export function Closing({ onAsk, isAsking, sentTo, refusal }: ClosingProps) {
  const [isOpen, setIsOpen] = useState(false);
  return (
    <View style={css('w-stack')}>
      <Text tone="quiet" measure>
        Closing removes your details, consents and sign-in. Of past orders we keep what was sold, as the books need it,
        without your name.
      </Text>
      {sentTo ? (
        <Notice kind="held" spoken title={`We wrote to ${sentTo}.`} next="The link in that mail closes the account." />
      ) : null}
      {refusal ? <Notice kind="error" title={refusal} /> : null}
      <View style={css('w-buttons')}>
        <Button kind="danger" label="Close the account" busy={isAsking} onPress={() => setIsOpen(true)} />
      </View>
      <Sheet
        open={isOpen}
        onClose={() => setIsOpen(false)}
        title="Close the account?"
        actions={
          <>
            <Button
              kind="danger"
              label="Send me the link"
              onPress={() => {
                setIsOpen(false);
                onAsk();
              }}
            />
            <Button kind="quiet" label="Keep the account" onPress={() => setIsOpen(false)} />
          </>
        }
      >
        <Text>We mail you a link that closes it. Download your data first, if you want it.</Text>
      </Sheet>
    </View>
  );
}

import { Button } from '#components/ui/button.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Sheet } from '#components/ui/sheet.tsx';
import { Text } from '#components/ui/text.tsx';
import type { Allocation } from '#shared/contracts/allocation.ts';
import { CompareTable } from './compare-table.tsx';

type PublishSheetProps = {
  open: boolean;
  plan: Allocation;
  published: Allocation | null;
  busy: boolean;
  error: Error | null;
  onPublish: () => void;
  onClose: () => void;
};

/** What changes for customers, before it does. */
export function PublishSheet({ open, plan, published, busy, error, onPublish, onClose }: PublishSheetProps) {
  return (
    <Sheet
      open={open}
      onClose={onClose}
      title="Publish this plan?"
      actions={
        <>
          <Button label="Put on sale" busy={busy} busyLabel="Publishing …" onPress={onPublish} />
          <Button kind="quiet" label="Not yet" onPress={onClose} />
        </>
      }
    >
      <Text>
        {published
          ? 'From now on the shop and the butchers see these figures instead. What is sold or held stays sold or held.'
          : 'From now on the shop and the butchers can order from this day.'}
      </Text>
      <CompareTable onSale beforeTitle="On sale now" nowTitle="After this" before={published} now={plan} />
      <ProblemNotice error={error} title="Nothing was published." />
    </Sheet>
  );
}

import { useLocalSearchParams } from 'expo-router';
import { useState } from 'react';
import { View } from 'react-native';
import { CollectionMailList } from '#components/collections/collection-mail-list.tsx';
import { describeMails, sendable } from '#components/collections/mail-choice.ts';
import { MailPreview } from '#components/collections/mail-preview.tsx';
import { DayPlaces } from '#components/office/day-places.tsx';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Sheet } from '#components/ui/sheet.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useCollectionMails, useConfirmCollectionMails, useResendMail } from '#hooks/collections.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { CollectionMail } from '#shared/contracts/packs.ts';
import { formatCount, formatDay } from '#shared/domain/words.ts';

export default function CollectionsScreen() {
  const { dayId } = useLocalSearchParams<{ dayId: string }>();
  const mails = useCollectionMails(dayId);
  return (
    <StateView
      query={mails}
      what="the collection mails"
      waiting={<Skeleton shape="rows" count={5} />}
      missing={{ title: 'No such cutting day', words: 'Look for it in the list of cutting days.' }}
    >
      {(data) => <Mails dayId={dayId} day={data.day} mails={data.mails} />}
    </StateView>
  );
}

function Mails({ dayId, day, mails }: { dayId: string; day: string; mails: readonly CollectionMail[] }) {
  const confirm = useConfirmCollectionMails();
  const resend = useResendMail();
  const [left, setLeft] = useState<ReadonlySet<string>>(new Set());
  const [preview, setPreview] = useState<CollectionMail>();
  // All that may go are chosen until somebody takes one out.
  const chosen = sendable(mails)
    .map((mail) => mail.orderId)
    .filter((orderId) => !left.has(orderId));
  useTitle(`Collections ${formatDay(day)}`);
  const choose = (orderId: string, isChosen: boolean) => {
    const next = new Set(left);
    if (isChosen) next.delete(orderId);
    else next.add(orderId);
    setLeft(next);
  };
  const send = () => confirm.mutate({ params: { dayId }, body: { orderIds: chosen } });
  return (
    <View style={css('w-stack-l')}>
      <TitleBar
        title="Collections"
        above={`${formatDay(day)} · ${describeMails(mails)}`}
        actions={
          chosen.length > 0 ? (
            <Button
              label={`Confirm ${formatCount(chosen.length, 'mail')}`}
              busy={confirm.isPending}
              busyLabel="Confirming …"
              onPress={send}
            />
          ) : null
        }
      />
      <DayPlaces dayId={dayId} role="owner" path={`/office/cutting-days/${dayId}/collections`} />
      {confirm.isSuccess ? (
        <Notice
          kind="good"
          spoken
          title="Confirmed."
          kept="Each mail goes out by itself; its state stands beside it."
        />
      ) : null}
      <ProblemNotice error={confirm.error} title="No mail was confirmed." />
      <ProblemNotice error={resend.error} title="The mail was not sent again." />
      {mails.length === 0 ? (
        <EmptyState
          title="No mails to look through"
          words="Once the orders of this day are packed, a mail for each of them waits here to be confirmed."
        />
      ) : (
        <CollectionMailList
          mails={mails}
          chosen={new Set(chosen)}
          onChoose={choose}
          onPreview={setPreview}
          onResend={(mailId) => resend.mutate(mailId)}
          resendingId={resend.isPending ? resend.variables : undefined}
        />
      )}
      <Sheet
        open={preview !== undefined}
        onClose={() => setPreview(undefined)}
        title={`Order ${preview?.orderNo ?? ''}`}
      >
        {preview ? <MailPreview mail={preview} /> : null}
      </Sheet>
    </View>
  );
}

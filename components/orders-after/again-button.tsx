import { View } from 'react-native';
import type { OrderAgain } from '#shared/contracts/account.ts';
import { formatDay } from '#shared/domain/words.ts';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { Sheet } from '#components/ui/sheet.tsx';
import { Text } from '#components/ui/text.tsx';

export type Again = {
  ask: () => void;
  isAsking: boolean;
  error: string | undefined;
  /** What cannot be had, or not all of it; to be read before the rest goes into the basket. */
  news: OrderAgain | undefined;
  take: (again: OrderAgain) => void;
  forget: () => void;
};

/** The same lines into the basket, for the next day that has them. */
export function AgainButton({ orderNo, again }: { orderNo: number; again: Again }) {
  const { news } = again;
  return (
    <View style={css('w-stack-s')}>
      <View style={css('w-buttons')}>
        <Button
          kind="quiet"
          small
          label="Order again"
          name={`Order again: order ${orderNo}`}
          busy={again.isAsking}
          onPress={again.ask}
        />
      </View>
      {again.error ? <Notice kind="error" title={again.error} /> : null}
      <Sheet
        open={news !== undefined}
        onClose={again.forget}
        title={news?.dayId ? 'Not all of it' : 'Nothing of it just now'}
        actions={
          news?.dayId ? (
            <>
              <Button label="Put the rest into the basket" onPress={() => again.take(news)} />
              <Button kind="quiet" label="Leave it" onPress={again.forget} />
            </>
          ) : (
            <Button kind="quiet" label="Close" onPress={again.forget} />
          )
        }
      >
        {news ? <News news={news} /> : null}
      </Sheet>
    </View>
  );
}

function News({ news }: { news: OrderAgain }) {
  const { day, gone, fewer } = news;
  const when = day ? ` for ${formatDay(day)}` : '';
  return (
    <View style={css('w-stack')}>
      {gone.length > 0 ? <Text>{`Not to be had${when}: ${gone.join(', ')}.`}</Text> : null}
      {fewer.map(({ name, asked, left }) => (
        <Text key={name}>{`Of ${name} only ${left} of the ${asked} are left${when}.`}</Text>
      ))}
      {day ? null : (
        <Text tone="quiet">As soon as a day with it is open, it stands on the first page of the shop.</Text>
      )}
    </View>
  );
}

import { useState } from 'react';
import { View } from 'react-native';
import { AccountTable } from '#components/trade/account-table.tsx';
import { RefuseForm, type Refusal } from '#components/trade/refuse-form.tsx';
import { ReservationList } from '#components/trade/reservation-list.tsx';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { ButtonLink } from '#components/ui/button-link.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Sheet } from '#components/ui/sheet.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import {
  useConfirmReservation,
  useDecideTradeAccount,
  useRefuseReservation,
  useReservations,
  useTradeAccounts,
} from '#hooks/trade.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { Reservation } from '#shared/contracts/trade.ts';

const loadRefusal = async () => (await import('#hooks/form-schemas.ts')).trade.refuseReservationSchema.body;

export default function OfficeTradeScreen() {
  const accounts = useTradeAccounts();
  const decide = useDecideTradeAccount();
  useTitle('Trade');
  return (
    <View style={css('w-stack-l')}>
      <TitleBar title="Trade" above="Reservations, accounts and price lists" />
      <Reservations />
      <View style={css('w-stack')}>
        <Heading level={2}>Accounts</Heading>
        <ProblemNotice error={decide.error} title="Nothing was decided." />
        <StateView query={accounts} what="the trade accounts" waiting={<Skeleton shape="rows" />}>
          {(data) => (
            <AccountTable
              accounts={data.accounts}
              decidingId={decide.isPending ? decide.variables.params.accountId : undefined}
              onDecide={({ id, version }, state) =>
                decide.mutate({ params: { accountId: id }, body: { version, state } })
              }
            />
          )}
        </StateView>
      </View>
    </View>
  );
}

function Reservations() {
  const reservations = useReservations();
  const confirm = useConfirmReservation();
  const [refusing, setRefusing] = useState<Reservation>();
  const actionsOf = (reservation: Reservation) =>
    reservation.state === 'asked' ? (
      <View style={css('w-buttons')}>
        <Button
          label="Work it in"
          name={`Work it in: reservation ${reservation.reservationNo}`}
          busy={confirm.isPending && confirm.variables.params.reservationId === reservation.id}
          busyLabel="Working it in …"
          onPress={() =>
            confirm.mutate({ params: { reservationId: reservation.id }, body: { version: reservation.version } })
          }
        />
        <Button
          kind="quiet"
          label="Refuse"
          name={`Refuse reservation ${reservation.reservationNo}`}
          onPress={() => setRefusing(reservation)}
        />
      </View>
    ) : reservation.state === 'confirmed' ? (
      <View style={css('w-buttons')}>
        <ButtonLink
          kind="quiet"
          label="Dispatch"
          name={`Dispatch reservation ${reservation.reservationNo}`}
          href={`/office/trade/dispatch/${reservation.id}`}
        />
      </View>
    ) : null;
  return (
    <View style={css('w-stack')}>
      <Heading level={2}>Reservations</Heading>
      <ProblemNotice error={confirm.error} title="The reservation was not worked in. It waits as it was." />
      <StateView query={reservations} what="the reservations" waiting={<Skeleton shape="rows" />}>
        {(data) =>
          data.reservations.length === 0 ? (
            <EmptyState level={3} title="No reservation yet" words="Butchers reserve from the coming carcases." />
          ) : (
            <ReservationList
              withBusiness
              reservations={data.reservations.toSorted(
                (a, b) => Number(b.state === 'asked') - Number(a.state === 'asked'),
              )}
              actionsOf={actionsOf}
            />
          )
        }
      </StateView>
      <Sheet
        open={refusing !== undefined}
        onClose={() => setRefusing(undefined)}
        title={`Refuse reservation ${refusing?.reservationNo ?? ''}?`}
      >
        {refusing ? <Refuse reservation={refusing} onDone={() => setRefusing(undefined)} /> : null}
      </Sheet>
    </View>
  );
}

function Refuse({ reservation, onDone }: { reservation: Reservation; onDone: () => void }) {
  const refuse = useRefuseReservation();
  const form = useContractForm<Refusal>(loadRefusal, { version: reservation.version, answer: '' });
  const submit = sendForm(form, async (body) => {
    await refuse.mutateAsync({ params: { reservationId: reservation.id }, body });
    onDone();
  });
  return (
    <View style={css('w-stack')}>
      <RefuseForm control={form.control} busy={refuse.isPending} onSubmit={submit} />
      <ProblemNotice error={refuse.error} title="The reservation was not refused." />
    </View>
  );
}

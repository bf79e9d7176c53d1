import { useState } from 'react';
import { View } from 'react-native';
import { CancelForm } from '#components/office/cancel-form.tsx';
import { FailedRefunds } from '#components/office/failed-refunds.tsx';
import { OrderTable } from '#components/office/order-table.tsx';
import { css } from '#components/theme/css.ts';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Select } from '#components/ui/select.tsx';
import { Sheet } from '#components/ui/sheet.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useCuttingDays } from '#hooks/carcases.ts';
import { useCancelOrderByOwner, useOfficeOrders } from '#hooks/office-orders.ts';
import { useFailedRefunds, useRetryRefund } from '#hooks/selling.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { OrderSummary } from '#shared/contracts/orders.ts';
import { ORDER_STATES } from '#shared/domain/order-state.ts';
import { formatCount, formatDayWithYear, formatMoney } from '#shared/domain/words.ts';

const loadReason = async () => (await import('#hooks/form-schemas.ts')).orders.cancelOrderByOwnerSchema.body;
const states = [{ value: '', label: 'all states' }, ...ORDER_STATES.map((value) => ({ value, label: value }))];

export default function OrdersScreen() {
  const [dayId, setDayId] = useState('');
  const [state, setState] = useState('');
  const [cancelling, setCancelling] = useState<OrderSummary>();
  const days = useCuttingDays();
  const orders = useOfficeOrders(dayId || undefined);
  useTitle('Orders');
  const dayOptions = (days.data?.days ?? []).map(({ id, day }) => ({ value: id, label: formatDayWithYear(day) }));
  return (
    <View style={css('w-stack-l')}>
      <StateView query={orders} what="the orders" waiting={<Skeleton shape="rows" count={6} />}>
        {(data) => {
          const shown = data.orders.filter((order) => state === '' || order.state === state);
          const totalPence = shown.reduce((sum, order) => sum + order.totalPence, 0);
          return (
            <>
              <TitleBar title="Orders" above={`${formatCount(shown.length, 'order')} · ${formatMoney(totalPence)}`} />
              <View style={css('w-fields')}>
                <Select
                  label="Cutting day"
                  value={dayId}
                  options={[{ value: '', label: 'all days' }, ...dayOptions]}
                  onChange={setDayId}
                />
                <Select label="State" value={state} options={states} onChange={setState} />
              </View>
              <Refunds />
              <OrderTable orders={shown} onCancel={setCancelling} />
            </>
          );
        }}
      </StateView>
      <Sheet
        open={cancelling !== undefined}
        onClose={() => setCancelling(undefined)}
        title={`Cancel order ${cancelling?.orderNo ?? ''}?`}
      >
        {cancelling ? <Cancel order={cancelling} onDone={() => setCancelling(undefined)} /> : null}
      </Sheet>
    </View>
  );
}

function Refunds() {
  const refunds = useFailedRefunds();
  const retry = useRetryRefund();
  return (
    <>
      <FailedRefunds
        refunds={refunds.data?.refunds ?? []}
        onRetry={(refund) => retry.mutate(refund.paymentId)}
        retryingId={retry.isPending ? retry.variables : undefined}
      />
      <ProblemNotice error={retry.error} title="The refund was not tried again." />
    </>
  );
}

function Cancel({ order, onDone }: { order: OrderSummary; onDone: () => void }) {
  const cancel = useCancelOrderByOwner();
  const form = useContractForm<{ reason: string }>(loadReason, { reason: '' });
  const submit = sendForm(form, async (body) => {
    await cancel.mutateAsync({ params: { orderId: order.id }, body });
    onDone();
  });
  return (
    <View style={css('w-stack')}>
      <CancelForm order={order} control={form.control} busy={cancel.isPending} onSubmit={submit} />
      <ProblemNotice error={cancel.error} title="The order was not cancelled." />
    </View>
  );
}

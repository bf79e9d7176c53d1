import { useState } from 'react';
import { View } from 'react-native';
import { AreaForm } from '#components/selling/area-form.tsx';
import { AreaTable } from '#components/selling/area-table.tsx';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Sheet } from '#components/ui/sheet.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useAddDeliveryArea, useDeliveryAreas, useEditDeliveryArea } from '#hooks/selling.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { DeliveryArea, DeliveryAreaEdit } from '#shared/contracts/delivery.ts';

const loadSchema = async () => (await import('#hooks/form-schemas.ts')).delivery.DeliveryAreaEdit;

const EMPTY: DeliveryAreaEdit = {
  ...{ name: '', prefixes: [], pricePence: 600, freeFromPence: null, weekday: 5 },
  ...{ startsAt: '13:00', endsAt: '17:00', capacity: 12, isActive: true },
};

export default function DeliveryAreasScreen() {
  const areas = useDeliveryAreas();
  const [open, setOpen] = useState<DeliveryArea | 'new'>();
  useTitle('Delivery areas');
  const close = () => setOpen(undefined);
  return (
    <View style={css('w-stack-l')}>
      <TitleBar
        title="Delivery areas"
        lead="The van sets out on the first such day after each cutting. Rounds that have stops keep their day and time."
      />
      <View style={css('w-buttons')}>
        <Button label="Add an area" onPress={() => setOpen('new')} />
      </View>
      <StateView query={areas} what="the delivery areas" waiting={<Skeleton shape="rows" count={3} />}>
        {(data) =>
          data.areas.length === 0 ? (
            <EmptyState title="The van goes nowhere yet" words="Until there is an area, every order is collected." />
          ) : (
            <AreaTable areas={data.areas} onEdit={setOpen} />
          )
        }
      </StateView>
      <Sheet open={open !== undefined} onClose={close} title={open === 'new' ? 'A new area' : 'Edit the area'}>
        {open === 'new' ? <Add onDone={close} /> : null}
        {open && open !== 'new' ? <Edit area={open} onDone={close} /> : null}
      </Sheet>
    </View>
  );
}

function Add({ onDone }: { onDone: () => void }) {
  const add = useAddDeliveryArea();
  const form = useContractForm<DeliveryAreaEdit>(loadSchema, EMPTY);
  const submit = sendForm(form, async (body) => {
    await add.mutateAsync(body);
    onDone();
  });
  return (
    <View style={css('w-stack')}>
      <AreaForm control={form.control} onSubmit={submit} busy={add.isPending} doLabel="Add the area" />
      <ProblemNotice error={add.error} title="The area was not added." />
    </View>
  );
}

function Edit({ area, onDone }: { area: DeliveryArea; onDone: () => void }) {
  const edit = useEditDeliveryArea();
  const { id, version, ...present } = area;
  const form = useContractForm<DeliveryAreaEdit>(loadSchema, present);
  const submit = sendForm(form, async (body) => {
    await edit.mutateAsync({ params: { areaId: id }, body: { version, area: body } });
    onDone();
  });
  return (
    <View style={css('w-stack')}>
      <AreaForm control={form.control} onSubmit={submit} busy={edit.isPending} doLabel="Save the area" />
      <ProblemNotice error={edit.error} title="The area was not saved." />
    </View>
  );
}

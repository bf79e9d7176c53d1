import { useState } from 'react';
import { View } from 'react-native';
import { PromoForm } from '#components/selling/promo-form.tsx';
import { PromoTable } from '#components/selling/promo-table.tsx';
import { css } from '#components/theme/css.ts';
import { EmptyState } from '#components/ui/empty-state.tsx';
import { Heading } from '#components/ui/heading.tsx';
import { Notice } from '#components/ui/notice.tsx';
import { ProblemNotice } from '#components/ui/problem-notice.tsx';
import { Skeleton } from '#components/ui/skeleton.tsx';
import { StateView } from '#components/ui/state-view.tsx';
import { TitleBar } from '#components/ui/title-bar.tsx';
import { useClosePromoCode, useMakePromoCode, usePromoCodes } from '#hooks/selling.ts';
import { sendForm, useContractForm } from '#hooks/use-contract-form.ts';
import { useTitle } from '#hooks/use-title.ts';
import type { NewPromoCode } from '#shared/contracts/promo.ts';

const loadSchema = async () => (await import('#hooks/form-schemas.ts')).promo.NewPromoCode;

const EMPTY: NewPromoCode = {
  ...{ code: '', percent: null, amountPence: null, minimumPence: 0, lastDay: null, usageLimit: null },
  isOncePerCustomer: true,
};

export default function PromoCodesScreen() {
  const codes = usePromoCodes();
  const close = useClosePromoCode();
  useTitle('Promotional codes');
  return (
    <View style={css('w-stack-l')}>
      <TitleBar
        title="Promotional codes"
        lead="A code is closed rather than changed: whoever has it in an order keeps what was promised."
      />
      <ProblemNotice error={close.error} title="The code was not closed." />
      <StateView query={codes} what="the codes" waiting={<Skeleton shape="rows" count={3} />}>
        {(data) =>
          data.codes.length === 0 ? (
            <EmptyState title="No code yet" words="The first one is made below." />
          ) : (
            <PromoTable
              codes={data.codes}
              onClose={(code) => close.mutate(code.id)}
              closingId={close.isPending ? close.variables : undefined}
            />
          )
        }
      </StateView>
      <NewCode />
    </View>
  );
}

function NewCode() {
  const [made, setMade] = useState<string>();
  return (
    <View style={css('w-stack')}>
      <Heading level={2}>A new code</Heading>
      {made ? <Notice kind="good" spoken title={`The code ${made} counts from now on.`} /> : null}
      <Form key={made ?? ''} onMade={setMade} />
    </View>
  );
}

function Form({ onMade }: { onMade: (code: string) => void }) {
  const make = useMakePromoCode();
  const form = useContractForm<NewPromoCode>(loadSchema, EMPTY);
  const submit = sendForm(form, async (body) => {
    const { code } = await make.mutateAsync(body);
    onMade(code);
  });
  return (
    <View style={css('w-stack')}>
      <PromoForm control={form.control} onSubmit={submit} busy={make.isPending} />
      <ProblemNotice error={make.error} title="The code was not made." />
    </View>
  );
}

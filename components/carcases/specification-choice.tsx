import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { Button } from '#components/ui/button.tsx';
import { Disclosure } from '#components/ui/disclosure.tsx';
import { Select } from '#components/ui/select.tsx';

type SpecificationChoiceProps = {
  /** What may be chosen; the edition that the day has stands first, even where it is offered no more. */
  specifications: readonly { id: string; name: string; edition: number }[];
  present: { id: string; label: string };
  chosenId: string;
  onChoose: (id: string) => void;
  onSend: () => void;
  busy: boolean;
};

/** Another specification for a day that is not on sale yet. */
export function SpecificationChoice({ specifications, present, ...choice }: SpecificationChoiceProps) {
  const others = specifications.filter(({ id }) => id !== present.id);
  return (
    <Disclosure words="Cut by another specification" ruled>
      <View style={css('w-stack')}>
        <Select
          label="Cutting specification"
          hint="Changing it makes new figures: a plan made before is out of date."
          value={choice.chosenId}
          options={[
            { value: present.id, label: `${present.label}, as it is` },
            ...others.map(({ id, name, edition }) => ({ value: id, label: `${name}, edition ${edition}` })),
          ]}
          onChange={choice.onChoose}
        />
        {choice.chosenId === present.id ? null : (
          <View style={css('w-buttons')}>
            <Button kind="quiet" label="Cut the day by this one" busy={choice.busy} onPress={choice.onSend} />
          </View>
        )}
      </View>
    </Disclosure>
  );
}

import { Disclosure } from '#components/ui/disclosure.tsx';
import { Select } from '#components/ui/select.tsx';

const LIMITS = [5, 15, 60, 180, 300] as const;

/** How long the plan may take. What is best by then is shown with its gap. */
export function TimeLimit({ seconds, onChange }: { seconds: number; onChange: (seconds: number) => void }) {
  return (
    <Disclosure words={`Time limit: ${limitWords(seconds)}`}>
      <Select
        label="Time limit"
        hint="What is best by then is the answer, shown with its gap. Only a proven answer can be published."
        value={String(seconds)}
        options={LIMITS.map((limit) => ({ value: String(limit), label: limitWords(limit) }))}
        onChange={(value) => onChange(Number(value))}
        width="short"
      />
    </Disclosure>
  );
}

function limitWords(seconds: number): string {
  return seconds < 60 ? `${seconds} seconds` : seconds === 60 ? '1 minute' : `${seconds / 60} minutes`;
}

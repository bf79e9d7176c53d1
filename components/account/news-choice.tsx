import type { MyDetails } from '#shared/contracts/account.ts';
import { CONSENT_VERSION, consentWords } from '#shared/domain/consent.ts';
import { formatDayTime } from '#shared/domain/words.ts';
import { Checkbox } from '#components/ui/checkbox.tsx';

type NewsChoiceProps = { news: MyDetails['news']; isSaving: boolean; onChange: (isGiven: boolean) => void };

/** Marketing mail, apart from mail about orders, which always comes. */
export function NewsChoice({ news, isSaving, onChange }: NewsChoiceProps) {
  const said = news.since ? `You said ${news.isGiven ? 'yes' : 'no'} on ${formatDayTime(news.since)}. ` : '';
  return (
    <Checkbox
      label={consentWords(CONSENT_VERSION)}
      note={`${said}Mails about your orders come in any case. You can stop these here, or from any of them, whenever you like.`}
      checked={news.isGiven}
      disabled={isSaving}
      onChange={onChange}
    />
  );
}

import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { DefinitionList } from '#components/ui/definition-list.tsx';
import { Disclosure } from '#components/ui/disclosure.tsx';
import type { CollectionMail } from '#shared/contracts/packs.ts';

/** The mail as it will arrive: as letters, and as the bare text that some programs show. */
export function MailPreview({ mail }: { mail: CollectionMail }) {
  return (
    <View style={css('w-stack')}>
      <DefinitionList
        items={[
          { term: 'To', value: mail.email },
          { term: 'Subject', value: mail.subject },
        ]}
      />
      {/* Nothing in a preview may run or lead away. */}
      <iframe
        title={`Mail to ${mail.name}`}
        sandbox=""
        srcDoc={mail.html}
        style={{ width: '100%', height: 420, border: '1px solid var(--line)', background: 'white' }}
      />
      <Disclosure words="As plain text">
        <pre className="t-text t-small" style={{ whiteSpace: 'pre-wrap' }}>
          {mail.text}
        </pre>
      </Disclosure>
    </View>
  );
}

import { View } from 'react-native';
import { css } from '#components/theme/css.ts';
import { DefinitionList } from '#components/ui/definition-list.tsx';
import { Text } from '#components/ui/text.tsx';
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
      <details>
        <summary className="w-nav-link">
          <Text weight="strong">As plain text</Text>
        </summary>
        <pre className="t-text t-small" style={{ whiteSpace: 'pre-wrap' }}>
          {mail.text}
        </pre>
      </details>
    </View>
  );
}

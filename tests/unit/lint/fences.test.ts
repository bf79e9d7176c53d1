import path from 'node:path';
import { ESLint } from 'eslint';
import { beforeAll, describe, expect, test } from 'vitest';

const root = path.resolve(import.meta.dirname, '../../..');

/** Each crosses one fence. The file need not exist: what counts is the folder that it would stand in. */
const badImports = [
  { where: 'shared/domain/money.ts', imports: '#server/deps.ts', because: 'shared is pure' },
  { where: 'components/ui/button.tsx', imports: '#hooks/api.ts', because: 'The kit takes props' },
  { where: 'components/rail/rail.tsx', imports: '#server/deps.ts', because: 'Server code never reaches the browser' },
  { where: 'hooks/api.ts', imports: '#components/ui/button.tsx', because: 'Hooks know no screen' },
  { where: 'app/_layout.tsx', imports: '#db/client.ts', because: 'Server code never reaches the browser' },
  { where: 'payments-fake/store.ts', imports: '#shared/domain/money.ts', because: 'It plays another company' },
];

async function messagesFor(eslint: ESLint, where: string, imports: string): Promise<string[]> {
  const results = await eslint.lintText(`import * as there from '${imports}';\nexport const used = there;\n`, {
    filePath: path.join(root, where),
  });
  const messages = results.flatMap((result) => result.messages);
  return messages.filter(({ ruleId }) => ruleId === 'no-restricted-imports').map(({ message }) => message);
}

describe('the fences between the folders', () => {
  let eslint: ESLint;
  beforeAll(() => {
    eslint = new ESLint({
      cwd: root,
      ruleFilter: ({ ruleId }) => ruleId === 'no-restricted-imports',
      // A fence needs no types: reading the whole project for them would take most of the test's time.
      overrideConfig: {
        files: ['**/*.ts', '**/*.tsx'],
        languageOptions: { parserOptions: { projectService: false } },
      },
    });
  });

  test.each(badImports)('an import of $imports, from $where, is refused', async ({ where, imports, because }) => {
    const messages = await messagesFor(eslint, where, imports);
    expect(messages).toHaveLength(1);
    expect(messages[0]).toContain(because);
  });

  test('an import that climbs out of its folder with dots, from a hook, is refused', async () => {
    expect(await messagesFor(eslint, 'hooks/api.ts', '../shared/domain/money.ts')).toHaveLength(1);
  });

  test('an import through the alias of a folder that may be used, from a hook, is allowed', async () => {
    expect(await messagesFor(eslint, 'hooks/api.ts', '#shared/domain/money.ts')).toEqual([]);
  });
});

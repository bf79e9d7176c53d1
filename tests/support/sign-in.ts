import { hashPassword } from 'better-auth/crypto';
import supertest from 'supertest';
import { account, user } from '#db/schema/auth.ts';
import type { Db } from '#db/client.ts';
import type { Role } from '#shared/domain/roles.ts';

export const PASSWORD = 'a password for tests';
const hashed = hashPassword(PASSWORD);

export type SignedIn = { userId: string; email: string; cookie: string };

/** Makes a verified account of a role and signs it in through the front door. */
export function makeSignIn(db: Db, origin: string) {
  let made = 0;
  return async (role: Role, email = `${role}-${(made += 1)}@example.com`): Promise<SignedIn> => {
    const rows = await db
      .insert(user)
      .values({ email, name: `Test ${role}`, emailVerified: true, role })
      .returning({ id: user.id });
    const userId = rows[0]?.id ?? '';
    await db.insert(account).values({ userId, providerId: 'credential', accountId: userId, password: await hashed });
    const answer = await supertest(origin)
      .post('/api/auth/sign-in/email')
      .set('Origin', origin)
      .send({ email, password: PASSWORD });
    if (answer.status !== 200) throw new Error(`Sign-in as ${role} answered ${answer.status}: ${answer.text}`);
    const cookies = answer.headers['set-cookie'] as unknown as string[];
    return { userId, email, cookie: cookies.map((cookie) => cookie.split(';')[0]).join('; ') };
  };
}

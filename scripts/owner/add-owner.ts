import { hashPassword } from 'better-auth/crypto';
import { eq } from 'drizzle-orm';
import { z } from 'zod';
import type { Db } from '#db/client.ts';
import { account, user } from '#db/schema/auth.ts';
import { farm } from '#db/schema/farm.ts';
import { collectionPoint } from '#db/schema/orders.ts';
import { insertStartingProducts } from '#db/seed/starting-products.ts';
import { Email, Line, Phone } from '#shared/contracts/fields-schema.ts';

export const NewOwner = z.object({
  email: Email,
  name: Line,
  password: z.string().min(10, 'At least ten characters.'),
});

/** Written as `Name; approval number`. */
const Premises = z
  .string()
  .transform((text) => text.split(';').map((part) => part.trim()))
  .pipe(z.tuple([Line, Line], 'Write the name, a semicolon and the approval number.'));

export const NewFarm = z.object({
  farm: Line,
  address: z
    .string()
    .transform((text) => text.split(';').map((part) => part.trim()))
    .pipe(z.array(Line).min(2, 'Write the lines of the address with semicolons between them.')),
  phone: Phone,
  abattoir: Premises,
  cutter: Premises,
});

export type OwnerWish = { owner: z.output<typeof NewOwner>; farm: z.output<typeof NewFarm> | null };

export async function hasFarm(db: Db): Promise<boolean> {
  return (await db.$count(farm)) > 0;
}

/**
 * Makes an owner and, in an empty database, the farm with what every farm starts with: one way to cut a side, its cuts,
 * the boxes, still off sale, and the farm gate. False when the address has an account already.
 */
export async function addOwner(db: Db, { owner, farm: newFarm }: OwnerWish): Promise<boolean> {
  const hashed = await hashPassword(owner.password);
  return db.transaction(async (tx) => {
    const email = owner.email.toLowerCase();
    const known = await tx.select({ id: user.id }).from(user).where(eq(user.email, email));
    if (known.length > 0) return false;
    const [row] = await tx
      .insert(user)
      .values({ email, name: owner.name, emailVerified: true, role: 'owner' })
      .returning({ id: user.id });
    if (!row) throw new Error('The owner was not kept.');
    await tx.insert(account).values({ userId: row.id, providerId: 'credential', accountId: row.id, password: hashed });
    if (newFarm) {
      await tx.insert(farm).values(farmRow(newFarm, email));
      await tx.insert(collectionPoint).values({
        name: 'The farm gate',
        addressLines: newFarm.address,
        directions: 'Ring us when you are here.',
        bring: 'A cool bag and your order number.',
      });
      await insertStartingProducts(tx, { isActive: false });
    }
    return true;
  });
}

function farmRow(newFarm: z.output<typeof NewFarm>, email: string): typeof farm.$inferInsert {
  const [abattoirName, abattoirApprovalNo] = newFarm.abattoir;
  const [cutterName, cutterApprovalNo] = newFarm.cutter;
  return {
    name: newFarm.farm,
    businessName: newFarm.farm,
    addressLines: newFarm.address,
    email,
    phone: newFarm.phone,
    story: 'We sell the whole of every beast that we kill.',
    abattoirName,
    abattoirApprovalNo,
    cutterName,
    cutterApprovalNo,
    // A portion and how closely packs lie in a freezer: common practice.
    servingGrams: 165,
    freezerGramsPerLitre: 620,
  };
}

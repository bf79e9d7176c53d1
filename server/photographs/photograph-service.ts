import { createHash } from 'node:crypto';
import type { Photograph } from '#shared/contracts/photographs.ts';
import { imageFacts } from '#shared/domain/image-size.ts';
import { PHOTOGRAPH_LIMITS } from '#shared/domain/photograph.ts';
import { AppError } from '#shared/errors.ts';
import type { Db, Deps, Tx } from '#server/deps.ts';
import { recordAudit } from '#server/farm/audit-queries.ts';
import { deletePhotograph, findBytes, hasBoxKind, insertPhotograph, listOfBox } from './photograph-queries.ts';

type List = { photographs: Photograph[] };

export async function readPhotographs(db: Db | Tx, box: { id: string } | { slug: string }): Promise<List> {
  const rows = await listOfBox(db, box);
  return { photographs: rows.map(({ hash, ...row }) => ({ ...row, href: `/api/photographs/${hash}` })) };
}

/** Kept as it was sent, once its own bytes say that it is a picture of a size that a page can show. */
export async function addPhotograph(
  deps: Deps,
  byUserId: string,
  { boxKindId, alt, bytes }: { boxKindId: string; alt: string; bytes: Uint8Array },
): Promise<List> {
  const facts = imageFacts(bytes);
  if (!facts) throw new AppError('INVALID_INPUT', 'This is no JPEG, PNG or WebP picture. Nothing was saved.');
  const { bytes: mostBytes, pixels } = PHOTOGRAPH_LIMITS;
  if (bytes.byteLength > mostBytes) {
    throw new AppError('TOO_LARGE', 'A picture may have two megabytes at most. Nothing was saved.');
  }
  const { width, height, contentType } = facts;
  if (width < 1 || height < 1 || width > pixels || height > pixels) {
    throw new AppError('INVALID_INPUT', `A picture may be ${pixels} pixels wide or high at most. Nothing was saved.`);
  }
  return deps.db.transaction(async (tx) => {
    if (!(await hasBoxKind(tx, boxKindId))) throw new AppError('NOT_FOUND', 'There is no such box.');
    const hash = createHash('sha256').update(bytes).digest('hex');
    await insertPhotograph(tx, { boxKindId, hash, contentType, bytes: Buffer.from(bytes), width, height, alt });
    await recordAudit(tx, {
      byUserId,
      action: 'added a photograph',
      subject: 'box kind',
      subjectId: boxKindId,
      detail: { hash, alt },
    });
    return readPhotographs(tx, { id: boxKindId });
  });
}

export async function removePhotograph(deps: Deps, byUserId: string, photographId: string): Promise<List> {
  return deps.db.transaction(async (tx) => {
    const boxKindId = await deletePhotograph(tx, photographId);
    if (!boxKindId) throw new AppError('NOT_FOUND', 'There is no such photograph.');
    const note = { action: 'removed a photograph', subject: 'box kind', subjectId: boxKindId };
    await recordAudit(tx, { byUserId, ...note });
    return readPhotographs(tx, { id: boxKindId });
  });
}

export async function getPhotograph(db: Db, hash: string) {
  const found = await findBytes(db, hash);
  if (!found) throw new AppError('NOT_FOUND', 'There is no such photograph.');
  return found;
}

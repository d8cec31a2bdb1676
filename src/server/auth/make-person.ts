import { hashPassword } from 'better-auth/crypto';
import type { Db } from '#db/client.ts';
import { newId } from '#db/columns.ts';
import { insertPerson } from '#db/queries/person.ts';
import { bindPendingMemberships } from '#server/members/pending.ts';

interface NewPerson {
  /** Lower case. */
  email: string;
  name: string;
  password: string;
  administrator?: boolean;
}

/** Makes an account that can sign in, and gives it the studies that waited for its address. @returns its id */
export async function makePerson(
  tx: Db,
  { email, name, password, administrator = false }: NewPerson,
): Promise<string> {
  const id = newId();
  const passwordHash = await hashPassword(password);
  await insertPerson(tx, { id, email, name, administrator, passwordHash });
  await bindPendingMemberships(tx, { userId: id, email });
  return id;
}

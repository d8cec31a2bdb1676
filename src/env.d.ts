/// <reference types="astro/client" />
import type { PooledDb } from './db/client.ts';
import type { SignedIn } from './server/auth/actor.ts';
import type { Member } from './server/member.ts';

declare global {
  namespace App {
    interface Locals {
      requestId: string;
      nonce: string;
      db: PooledDb;
      /** Null only on public routes. */
      user: SignedIn | null;
      /** The actor's place in the study of the address; null where the address has none. */
      member: Member | null;
    }
  }
}

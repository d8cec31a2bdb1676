/// <reference types="astro/client" />
declare namespace App {
  interface Locals {
    requestId: string;
    nonce: string;
    db: import('./db/client.ts').PooledDb;
    /** Null only on public routes. */
    user: import('./server/auth/actor.ts').SignedIn | null;
    /** The actor's place in the study of the address; null where the address has none. */
    member: import('./server/member.ts').Member | null;
  }
}

import pg from 'pg';

type Release = pg.PoolClient['release'];

/**
 * Gives a client whose connection ends back to its pool by itself, and makes giving it back twice harmless: a
 * transaction whose first statement fails is never given back by drizzle, and a pool that keeps count of such clients
 * is used up after a few outages.
 */
function giveBackWhenBroken(client: pg.PoolClient): pg.PoolClient {
  const release: Release = client.release.bind(client);
  let isGiven = false;
  const giveBack: Release = (destroy) => {
    if (isGiven) return;
    isGiven = true;
    client.off('end', whenBroken);
    release(destroy);
  };
  const whenBroken = (): void => giveBack(true);
  client.on('end', whenBroken);
  client.release = giveBack;
  return client;
}

type Callback = Parameters<pg.Pool['connect']>[0];

/** A pool that outlives its database's restarts. */
export class EnduringPool extends pg.Pool {
  constructor(config: pg.PoolConfig) {
    super(config);
    // Without listeners a broken connection would end the process: the pool's own hears of idle ones, each client's of
    // one that breaks between two statements of a transaction.
    this.on('error', () => undefined);
    this.on('connect', (client) => void client.on('error', () => undefined));
  }

  override connect(): Promise<pg.PoolClient>;
  override connect(callback: Callback): void;
  override connect(callback?: Callback): Promise<pg.PoolClient> | void {
    if (callback) return super.connect(callback);
    return super.connect().then(giveBackWhenBroken);
  }
}

import fs from 'node:fs';
import os from 'node:os';
import path from 'node:path';
import { Cluster } from './cluster.ts';

const PREFIX = 'spinward-test-';

const isAlive = (pid: number): boolean => fs.existsSync(`/proc/${pid}`);

/** Stops and removes what earlier test runs left behind when they were killed. */
async function sweep(): Promise<void> {
  for (const name of fs.readdirSync(os.tmpdir())) {
    const pid = Number(new RegExp(`^${PREFIX}(\\d+)-`).exec(name)?.[1]);
    if (!pid || isAlive(pid)) continue;
    const data = path.join(os.tmpdir(), name);
    if (fs.existsSync(path.join(data, 'cluster.json')))
      await (await Cluster.open({ data, durable: false })).stop();
    fs.rmSync(data, { recursive: true, force: true });
  }
}

export interface TestCluster {
  cluster: Cluster;
  data: string;
  close: () => Promise<void>;
}

/** A cluster of this test run alone, in the temporary folder; without fsync, for speed, unless asked for. */
export async function openTestCluster({ durable = false } = {}): Promise<TestCluster> {
  await sweep();
  const data = fs.mkdtempSync(path.join(os.tmpdir(), `${PREFIX}${process.pid}-`));
  fs.chmodSync(data, 0o711);
  const cluster = await Cluster.open({ data, durable });
  return {
    cluster,
    data,
    close: async () => {
      await cluster.stop();
      fs.rmSync(data, { recursive: true, force: true });
    },
  };
}

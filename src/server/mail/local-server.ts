import type { AddressInfo } from 'node:net';
import PostalMime from 'postal-mime';
import { SMTPServer, type SMTPServerDataStream, type SMTPServerSession } from 'smtp-server';
import type { Db } from '#db/client.ts';
import { insertKept } from '#db/queries/mail.ts';

const MAX_BYTES = 5 * 1024 * 1024;

async function readAll(stream: SMTPServerDataStream): Promise<Buffer> {
  const parts: Buffer[] = [];
  for await (const part of stream) parts.push(part as Buffer);
  if (stream.sizeExceeded) throw new Error(`The message is larger than ${MAX_BYTES} bytes.`);
  return Buffer.concat(parts);
}

async function keep(db: Db, stream: SMTPServerDataStream, { envelope }: SMTPServerSession): Promise<void> {
  const source = await readAll(stream);
  const message = await PostalMime.parse(source);
  await insertKept(db, {
    fromAddress: envelope.mailFrom ? envelope.mailFrom.address : '',
    toAddresses: envelope.rcptTo.map(({ address }) => address),
    subject: message.subject ?? '',
    text: message.text ?? '',
    source: source.toString('utf8'),
  });
}

export interface LocalMailServer {
  port: number;
  close: () => Promise<void>;
}

/**
 * A mail server on loopback for an installation that has none: it delivers nothing and keeps everything for the
 * administrator's outbox. Mail takes the same way to it as to a real one.
 */
export async function startLocalMailServer(db: Db): Promise<LocalMailServer> {
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    size: MAX_BYTES,
    onData: (stream, session, done) => {
      keep(db, stream, session).then(
        () => done(),
        (error: Error) => done(error),
      );
    },
  });
  server.on('error', () => undefined);
  await new Promise<void>((resolve, reject) => {
    server.server.once('error', reject);
    server.listen(0, '127.0.0.1', resolve);
  });
  const { port } = server.server.address() as AddressInfo;
  return { port, close: () => new Promise((resolve) => server.close(() => resolve())) };
}

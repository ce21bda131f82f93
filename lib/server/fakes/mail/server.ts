import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import { type AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';
import { listPage, mailPage } from './pages';
import { Mailbox } from './mailbox';

export interface MailFakeOptions {
  /** 0: ports that the system picks. */
  readonly smtpPort: number;
  readonly webPort: number;
  /** Where the messages are kept. */
  readonly folder: string;
}

export interface MailFake {
  readonly smtpUrl: string;
  readonly webUrl: string;
  readonly close: () => Promise<void>;
}

/**
 * A mail relay on 127.0.0.1 that keeps what it is given, and a mailbox to read it: `/` for people,
 * `GET /api/mails?to=` and `DELETE /api/mails?to=` for tests (without `to`: all).
 */
export async function startMailFake({ smtpPort, webPort, folder }: MailFakeOptions): Promise<MailFake> {
  const mailbox = await Mailbox.open(folder);
  const smtp = new SMTPServer({
    disabledCommands: ['STARTTLS'],
    authOptional: true,
    onData(stream, _session, done) {
      const pieces: Buffer[] = [];
      stream.on('data', (piece: Buffer) => pieces.push(piece));
      stream.on('end', () => {
        mailbox.keep(Buffer.concat(pieces)).then(
          () => done(),
          (error: unknown) => done(error instanceof Error ? error : new Error(String(error))),
        );
      });
    },
  });
  smtp.on('error', (error: Error) => console.error(error.message));
  const web = createServer((request, response) => show(request, response, mailbox));
  const smtpAddress = await listen(smtp, smtpPort);
  const webAddress = await listen(web, webPort);
  return {
    smtpUrl: `smtp://127.0.0.1:${smtpAddress.port}`,
    webUrl: `http://127.0.0.1:${webAddress.port}`,
    close: async () => {
      await new Promise<void>((resolve) => smtp.close(resolve));
      web.closeAllConnections();
      await new Promise((resolve) => web.close(resolve));
    },
  };
}

function listen(server: Server | SMTPServer, port: number): Promise<AddressInfo> {
  const socket = server instanceof SMTPServer ? server.server : server;
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', () => resolve(socket.address() as AddressInfo));
  });
}

function show(request: IncomingMessage, response: ServerResponse, mailbox: Mailbox): void {
  const url = new URL(request.url ?? '/', 'http://127.0.0.1');
  const send = (status: number, type: string, text: string) =>
    response
      .writeHead(status, { 'content-type': `${type}; charset=utf-8`, 'cache-control': 'no-store' })
      .end(text);
  const to = url.searchParams.get('to');
  if (url.pathname === '/api/mails' && request.method === 'GET') {
    send(200, 'application/json', JSON.stringify(mailbox.list(to)));
    return;
  }
  if (url.pathname === '/api/mails' && request.method === 'DELETE') {
    mailbox.clear(to);
    response.writeHead(204).end();
    return;
  }
  const mail = url.pathname.startsWith('/mails/') ? mailbox.find(url.pathname.slice('/mails/'.length)) : null;
  if (request.method === 'GET' && mail) send(200, 'text/html', mailPage(mail));
  else if (request.method === 'GET' && url.pathname === '/')
    send(200, 'text/html', listPage(mailbox.list(null)));
  else send(404, 'text/plain', 'Not here.\n');
}

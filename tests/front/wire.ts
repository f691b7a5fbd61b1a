// Requests as bytes on the wire: fetch would tidy up what these tests send.
import { createConnection } from 'node:net';

export interface Answer {
  status: number;
  headers: Record<string, string>;
  body: string;
}

/** Sends bytes as they stand, optionally in pieces with pauses, and reads until the server closes. */
export function exchange(
  port: number,
  pieces: string | (string | number)[],
  patience_ms = 10_000,
): Promise<Answer> {
  return new Promise((resolve, reject) => {
    const socket = createConnection(port, '127.0.0.1');
    const received: Buffer[] = [];
    const timer = setTimeout(() => socket.destroy(new Error('no answer in time')), patience_ms);
    socket.on('data', (chunk) => received.push(chunk));
    socket.once('error', (error) => {
      clearTimeout(timer);
      if (received.length === 0) reject(error);
    });
    socket.once('close', () => {
      clearTimeout(timer);
      const [head = '', ...rest] = Buffer.concat(received).toString('utf8').split('\r\n\r\n');
      const [first = '', ...lines] = head.split('\r\n');
      const headers = Object.fromEntries(
        lines.map((line) => [
          line.slice(0, line.indexOf(':')).toLowerCase(),
          line.slice(line.indexOf(':') + 2),
        ]),
      );
      if (first) resolve({ status: Number(first.split(' ')[1]), headers, body: rest.join('\r\n\r\n') });
      else reject(new Error('the connection closed without an answer'));
    });
    void (async () => {
      for (const piece of [pieces].flat()) {
        if (typeof piece === 'number') await new Promise((next) => setTimeout(next, piece));
        else if (!socket.destroyed) socket.write(piece);
      }
    })();
  });
}

/** A request's bytes. Headers given as undefined are left out. */
export function requestText(
  line: string,
  headers: Record<string, string | undefined> = {},
  body = '',
): string {
  const all = { Host: '127.0.0.1:4321', Connection: 'close', ...headers };
  const lines = Object.entries(all).flatMap(([name, value]) =>
    value === undefined ? [] : [`${name}: ${value}`],
  );
  return [`${line} HTTP/1.1`, ...lines, '', body].join('\r\n');
}

import { connect, createServer, type Socket } from 'node:net';

/** A door before a mail server that can be shut: then every connection is broken off, as by a server that is away. */
export type SmtpGate = {
  url: string;
  leadTo: (smtpUrl: string) => void;
  shut: () => void;
  open: () => void;
  /** How many connections were let through. */
  passed: () => number;
  close: () => Promise<void>;
};

export async function anSmtpGate(): Promise<SmtpGate> {
  let target: URL | null = null;
  let isOpen = true;
  let passed = 0;
  const server = createServer((socket: Socket) => {
    if (!isOpen || !target) return void socket.destroy();
    passed += 1;
    const inner = connect(Number(target.port), target.hostname);
    socket.pipe(inner).pipe(socket);
    for (const [one, other] of [
      [socket, inner],
      [inner, socket],
    ] as const)
      one.on('error', () => other.destroy());
  });
  await new Promise<void>((listening) => server.listen(0, '127.0.0.1', listening));
  const address = server.address();
  const port = address && typeof address === 'object' ? address.port : 0;
  return {
    url: `smtp://127.0.0.1:${port}`,
    leadTo: (smtpUrl) => void (target = new URL(smtpUrl)),
    shut: () => void (isOpen = false),
    open: () => void (isOpen = true),
    passed: () => passed,
    close: () => new Promise((closed) => server.close(() => closed())),
  };
}

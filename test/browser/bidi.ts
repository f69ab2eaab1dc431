/** WebDriver BiDi, as far as the tests need it: commands with their answers, and events. */
import { type ChildProcess, spawn } from 'node:child_process';
import { createInterface } from 'node:readline';
import { fileURLToPath } from 'node:url';

export interface Bidi {
  /** Errors: Error with the command and the browser's own words. */
  send(method: string, parameters: object): Promise<Readonly<Record<string, unknown>>>;
  close(): void;
}

interface Message {
  readonly type: 'success' | 'error' | 'event';
  readonly id?: number;
  readonly method?: string;
  readonly params?: Readonly<Record<string, unknown>>;
  readonly result?: Readonly<Record<string, unknown>>;
  readonly message?: string;
}

type Waiting = (message: Message) => void;

const relayScript = fileURLToPath(new URL('./bidiRelay.mjs', import.meta.url));

/** `heard` gets every event. */
export function connectBidi(
  address: string,
  heard: (method: string, event: Readonly<Record<string, unknown>>) => void,
): Bidi {
  const relay = spawn(process.execPath, ['--experimental-websocket', '--no-warnings', relayScript, address], {
    stdio: ['pipe', 'pipe', 'inherit'],
  });
  const waiting = new Map<number, Waiting>();
  let ids = 0;
  createInterface({ input: relay.stdout }).on('line', (line) => {
    const message = JSON.parse(line) as Message;
    if (message.id === undefined || message.id === null) heard(message.method ?? '', message.params ?? {});
    else waiting.get(message.id)?.(message);
  });
  relay.on('exit', () => {
    for (const tell of waiting.values()) tell({ type: 'error', message: 'the connection ended' });
  });
  return {
    send: (method, params) => send(relay, waiting, { id: ++ids, method, params }),
    close: () => relay.stdin.end(),
  };
}

function send(
  relay: ChildProcess,
  waiting: Map<number, Waiting>,
  command: { readonly id: number; readonly method: string; readonly params: object },
): Promise<Readonly<Record<string, unknown>>> {
  return new Promise((done, failed) => {
    waiting.set(command.id, (message) => {
      waiting.delete(command.id);
      if (message.type === 'success') done(message.result ?? {});
      else failed(new Error(`${command.method}: ${message.message ?? 'no reason given'}`));
    });
    relay.stdin?.write(`${JSON.stringify(command)}\n`);
  });
}

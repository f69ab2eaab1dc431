/**
 * Carries messages to and from a WebDriver BiDi address, one a line: for Node 20, where WebSocket is behind a flag.
 *
 *   node --experimental-websocket bidiRelay.mjs ADDRESS
 */
import { createInterface } from 'node:readline';

const socket = new WebSocket(process.argv[2]);
socket.onmessage = ({ data }) => process.stdout.write(`${data}\n`);
socket.onclose = () => process.exit(0);
socket.onerror = () => process.exit(1);
socket.onopen = () => createInterface({ input: process.stdin }).on('line', (line) => socket.send(line));
process.stdin.on('end', () => socket.close());

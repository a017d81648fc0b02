import path from 'node:path';
import type { Plugin } from 'vite';

const only = '\0tarewell-websocket-only:';

/**
 * Leaves polling and WebTransport out of the socket's client: this app connects by WebSocket alone
 * (src/api/socket.ts), and the client's own list of transports carries all three.
 */
export const websocketOnly = (): Plugin => ({
  name: 'tarewell-websocket-only',
  apply: 'build',
  enforce: 'pre',
  resolveId(source, importer) {
    if (source !== './transports/index.js' || !importer?.includes('engine.io-client')) return null;
    return only + path.join(path.dirname(importer), 'transports/websocket.js');
  },
  load(id) {
    if (!id.startsWith(only)) return null;
    const websocket = JSON.stringify(id.slice(only.length));
    return `import { WS } from ${websocket};\nexport const transports = { websocket: WS };\n`;
  },
});

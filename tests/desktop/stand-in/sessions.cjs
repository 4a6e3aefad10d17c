const { createServer } = require("node:http");

/**
 * Sessions with protocols of their own. Chromium does not know the schemes, so each is served on a host of this machine's that belongs to
 * the session: `app://fieldtray/x` becomes `http://fieldtray.app.s0.localhost:PORT/x`, and back.
 */

const schemes = new Set();
const sessions = new Map();
let server = null;
let ready = false;

class Session {
  constructor(number) {
    this.number = number;
    this.handlers = new Map();
    this.protocol = {
      handle: (scheme, handler) => {
        if (!schemes.has(scheme)) throw new Error(`the scheme ${scheme} was not registered as privileged`);
        this.handlers.set(scheme, handler);
      },
    };
    this.mayRequest = null;
  }
  /** Asks the handler of an address's scheme directly. */
  fetch(address) {
    return this.handlers.get(new URL(address).protocol.slice(0, -1))(new Request(address));
  }
  setPermissionRequestHandler(handler) {
    this.mayRequest = handler;
  }
  setPermissionCheckHandler(handler) {
    this.mayCheck = handler;
  }
  setDevicePermissionHandler(handler) {
    this.mayUseDevice = handler;
  }
}

function sessionOf(partition) {
  if (!sessions.has(partition)) sessions.set(partition, new Session(sessions.size));
  return sessions.get(partition);
}

const session = {
  get defaultSession() {
    return sessionOf("");
  },
  fromPartition: (partition) => sessionOf(partition),
};

const protocol = {
  registerSchemesAsPrivileged: (list) => {
    if (ready) throw new Error("schemes are registered before the program is ready");
    for (const { scheme } of list) schemes.add(scheme);
  },
};

/** Starts the server behind the schemes. */
function openSchemes() {
  ready = true;
  return new Promise((resolve) => {
    server = createServer(async (request, response) => {
      try {
        const address = fromLocal(`http://${request.headers.host}${request.url}`);
        const number = Number(/\.s(\d+)\.localhost/.exec(request.headers.host)[1]);
        const [owner] = [...sessions.values()].filter((one) => one.number === number);
        const handler = owner.handlers.get(new URL(address).protocol.slice(0, -1));
        const answer = await handler(new Request(address, { method: request.method }));
        response.writeHead(answer.status, Object.fromEntries(answer.headers));
        response.end(Buffer.from(await answer.arrayBuffer()));
      } catch (error) {
        response.writeHead(500).end(String(error));
      }
    });
    server.listen(0, "127.0.0.1", resolve);
  });
}

const port = () => server.address().port;

function toLocal(address, owner) {
  const match = /^([a-z]+):\/\/([a-z]+)(\/.*)?$/.exec(address);
  if (match === null || !owner.handlers.has(match[1])) return address;
  return `http://${match[2]}.${match[1]}.s${owner.number}.localhost:${port()}${match[3] ?? "/"}`;
}

function fromLocal(address) {
  const match = /^http:\/\/([a-z]+)\.([a-z]+)\.s\d+\.localhost:\d+(.*)$/.exec(address);
  return match === null ? address : `${match[2]}://${match[1]}${match[3]}`;
}

/** Asks a session's handler directly, as a viewer inside the engine would. */
async function contentOf(address, owner) {
  const handler = owner.handlers.get(new URL(address).protocol.slice(0, -1));
  return handler === undefined ? null : handler(new Request(address));
}

module.exports = { session, protocol, openSchemes, toLocal, fromLocal, contentOf };

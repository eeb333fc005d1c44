/**
 * The app behind Node's own HTTP server. What the framework would take from strangers on trust, or answer
 * in a shape that is not ours, is put right here before it sees the request.
 *
 *   HOST, PORT     where to listen; PORT=0 takes a free one
 *   TRUST_PROXY=1  a proxy stands before us, and its X-Forwarded-* fields are believed
 *   --dev          the framework's development mode
 */
import http from 'node:http';
import next from 'next';

const dev = process.argv.includes('--dev');
const host = process.env.HOST ?? '127.0.0.1';
const trustsProxy = process.env.TRUST_PROXY === '1';

const longestDrain = 10_000;
const frameworkMethods = new Set(['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE', 'OPTIONS']);

const underWay = new Set();
const upgraded = new Set();
let stopping = false;
let upgrade;
let answer;
/** Requests that come before the framework is prepared wait for it. */
const ready = new Promise((resolve) => {
  answer = resolve;
});

const server = http.createServer(
  {
    maxHeaderSize: 16 * 1024,
    // Clients that send a byte now and then are cut off; how often to look decides how punctually.
    headersTimeout: 10_000,
    requestTimeout: 60_000,
    connectionsCheckingInterval: 2_000,
    // Longer than proxies keep theirs, so that none sends into a connection that we are closing.
    keepAliveTimeout: 65_000,
  },
  async (request, response) => {
    underWay.add(response);
    response.once('close', () => underWay.delete(response));
    if (stopping) response.setHeader('Connection', 'close');
    const handle = await ready;
    setRight(request);
    // An unknown method that is still here is one for a page, and some make the framework stumble.
    if (!frameworkMethods.has(request.method)) return response.writeHead(405, { Allow: 'GET, HEAD' }).end();
    await handle(request, response);
  },
);

// ---------------------------------------------------------------------------------------------------
// Requests

/** What we and the framework's parts say to one another, and nobody else may. */
const internalFields = /^x-(linewright|middleware)-/;
/** What a proxy says, believed only when there is one. */
const proxyFields = /^(x-forwarded-|forwarded$)/;
/** How the framework's pages ask for parts of themselves; in the API it would redirect them. */
const pageFields = /^(rsc$|next-|x-nextjs-|x-matched-path$|x-invoke-|x-now-)/;

function setRight(request) {
  // A request line may hold the whole URL; whose name it gives is no matter here.
  request.url = request.url.replace(/^https?:\/\/[^/?#]*(?=[/?#]|$)/i, '') || '/';
  const isApi = isUnderApi(request.url);
  const { headers } = request;
  for (const name of Object.keys(headers)) {
    if (internalFields.test(name) || (!trustsProxy && proxyFields.test(name)) || (isApi && pageFields.test(name))) delete headers[name];
  }
  if (!trustsProxy && request.socket.remoteAddress) headers['x-forwarded-for'] = request.socket.remoteAddress;

  // A path that no page can have is led to where every unknown path is answered: 404, in the shape of its place.
  if (!isReadable(request.url, isApi)) request.url = isApi ? '/api/unreadable-path' : '/unreadable-path';
  // The framework answers an unknown method with an empty 500; the API's own routes know what is allowed.
  if (isApi && !frameworkMethods.has(request.method)) {
    headers['x-linewright-method'] = request.method;
    request.method = 'OPTIONS';
  }
}

/** Judged as the framework will see it, with its dots resolved. */
function isUnderApi(url) {
  try {
    return /^\/+api(\/|$)/.test(new URL(url.replace(/^\/+/, '/'), 'http://linewright').pathname);
  } catch {
    return false;
  }
}

/** Whether the framework's URL handling can read this at all, and reads in it what we do. */
function isReadable(url, isApi) {
  const [path] = url.split(/[?#]/, 1);
  if (!path.startsWith('/') || path.includes('//') || path.includes('\\')) return false;
  // The framework takes `/x/` for `/x`; the API has one name for each thing.
  if (isApi && path.endsWith('/')) return false;
  try {
    return !/[\u0000-\u001f\u007f]/.test(decodeURIComponent(path));
  } catch {
    return false;
  }
}

server.on('clientError', (error, socket) => {
  if (error.code === 'ECONNRESET' || !socket.writable) return socket.destroy();
  const status = { HPE_HEADER_OVERFLOW: '431 Request Header Fields Too Large', ERR_HTTP_REQUEST_TIMEOUT: '408 Request Timeout' }[error.code] ?? '400 Bad Request';
  socket.end(`HTTP/1.1 ${status}\r\nConnection: close\r\nContent-Length: 0\r\n\r\n`);
});

server.on('upgrade', (request, socket, head) => {
  // Only the development mode speaks WebSocket; nothing is under way in one that an end could cut short.
  if (upgrade && !stopping) {
    upgraded.add(socket);
    socket.once('close', () => upgraded.delete(socket));
    upgrade(request, socket, head);
  } else socket.end('HTTP/1.1 400 Bad Request\r\nConnection: close\r\nContent-Length: 0\r\n\r\n');
});

// ---------------------------------------------------------------------------------------------------
// Beginning and end

async function stop() {
  if (stopping) return;
  stopping = true;
  setTimeout(() => process.exit(1), longestDrain).unref();
  for (const response of underWay) if (!response.headersSent) response.setHeader('Connection', 'close');
  const closed = new Promise((resolve) => server.close(resolve));
  for (const socket of upgraded) socket.destroy();
  const idle = setInterval(() => server.closeIdleConnections(), 50);
  await closed;
  clearInterval(idle);
  process.exit(0);
}

process.on('SIGTERM', stop);
process.on('SIGINT', stop);
// Started by another process that is gone: nobody is left to stop us.
process.on('disconnect', stop);

server.on('error', (error) => {
  console.error(error.code === 'EADDRINUSE' ? `EADDRINUSE: port ${error.port} on ${host} is taken` : error);
  process.exit(1);
});

server.listen(Number(process.env.PORT ?? 3000), host, async () => {
  const { port } = server.address();
  const url = `http://${host.includes(':') ? `[${host}]` : host}:${port}`;
  process.env.PUBLIC_URL ??= url;
  const app = next({ dev, hostname: host, port });
  await app.prepare();
  if (dev) upgrade = app.getUpgradeHandler();
  answer(app.getRequestHandler());
  console.log(`listening on ${url}`);
  process.send?.({ port, url });
});

import { createServer, type AddressInfo, type Server } from 'node:net';

const { checkPort, freePort, isPortFree } = jest.requireActual<{
  checkPort: (port: number) => Promise<void>;
  freePort: (remembered?: number, taken?: number[]) => Promise<number>;
  isPortFree: (port: number) => Promise<boolean>;
}>('./ports.mjs');

describe('ports', () => {
  let server: Server;
  let taken: number;

  beforeEach(async () => {
    server = createServer();
    await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
    taken = (server.address() as AddressInfo).port;
  });
  afterEach(() => new Promise((resolve) => server.close(resolve)));

  it('says in a sentence which port is taken', async () => {
    await expect(checkPort(taken)).rejects.toThrow(`Port ${taken} is taken by another program`);
  });

  it('keeps a remembered port while it is free', async () => {
    const port = await freePort();
    expect(await freePort(port)).toBe(port);
    expect(await isPortFree(port)).toBe(true);
  });

  it('finds another one when the remembered port is in use or promised', async () => {
    expect(await freePort(taken)).not.toBe(taken);
    const port = await freePort();
    expect(await freePort(port, [port])).not.toBe(port);
  });
});

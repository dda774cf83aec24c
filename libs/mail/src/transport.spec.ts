import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';
import { MailSendError } from './mail-send-error';
import { createMailTransport } from './transport';

const MESSAGE = { messageId: '<1@x.example>', to: 'nobody@x.example', subject: 's', html: '<p>h</p>', text: 't' };

/** A server that refuses every recipient with one code. */
function refusingServer(responseCode: number): Promise<{ url: string; close: () => void }> {
  const server = new SMTPServer({
    disabledCommands: ['STARTTLS', 'AUTH'],
    authOptional: true,
    closeTimeout: 100,
    onRcptTo: (_address, _session, callback) => callback(Object.assign(new Error('refused'), { responseCode })),
  });
  return new Promise((resolve) => {
    const net = server.listen(0, '127.0.0.1', () => {
      resolve({ url: `smtp://127.0.0.1:${(net.address() as AddressInfo).port}`, close: () => server.close() });
    });
  });
}

async function sendTo(url: string): Promise<MailSendError> {
  const transport = createMailTransport(url, 'a@x.example');
  const error: unknown = await transport.send(MESSAGE).then(
    () => undefined,
    (reason: unknown) => reason,
  );
  transport.close();
  expect(error).toBeInstanceOf(MailSendError);
  return error as MailSendError;
}

describe('createMailTransport', () => {
  it.each([
    [550, true],
    [450, false],
  ])('calls a refusal with %i permanent: %s', async (code, isPermanent) => {
    const server = await refusingServer(code);
    expect(await sendTo(server.url)).toMatchObject({ responseCode: code, isPermanent });
    server.close();
  });

  it('calls a server that is not there a passing trouble', async () => {
    const server = await refusingServer(550);
    server.close();
    await new Promise((resolve) => setTimeout(resolve, 150));
    expect(await sendTo(server.url)).toMatchObject({ responseCode: undefined, isPermanent: false });
  });

  it.each(['', 'mail.example', 'http://mail.example', 'smtp://'])('refuses "%s" as an address', (url) => {
    expect(() => createMailTransport(url, 'a@x.example')).toThrow(RangeError);
  });
});

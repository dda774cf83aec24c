import type { IntakeView } from '@app/contracts';
import { PASSWORD } from '../../support/factories/people';
import { type Program, until } from './program';

/** A person at the program's routes; a token is good for the programs of one secret, killed or not. */
export class RouteClient {
  private token = '';

  constructor(private readonly port: number) {}

  private url(path: string): string {
    return `http://127.0.0.1:${this.port}/api/${path}`;
  }

  async ready(program: Program): Promise<void> {
    await until(
      'the program answers',
      () =>
        fetch(this.url('health/ready')).then(
          (answer) => answer.ok,
          () => false,
        ),
      { program },
    );
  }

  async signIn(email: string): Promise<void> {
    const answer = await fetch(this.url('auth/sign-in'), {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ email, password: PASSWORD }),
    });
    this.token = ((await answer.json()) as { accessToken: string }).accessToken;
  }

  upload(lineId: number, name: string, bytes: Buffer): Promise<IntakeView> {
    const form = new FormData();
    form.append('file', new Blob([Uint8Array.from(bytes)]), name);
    return this.send<IntakeView>(`lines/${lineId}/intakes`, { method: 'POST', body: form });
  }

  confirm(intakeId: number): Promise<IntakeView> {
    return this.send<IntakeView>(`intakes/${intakeId}/confirm`, { method: 'POST' });
  }

  intake(intakeId: number): Promise<IntakeView> {
    return this.send<IntakeView>(`intakes/${intakeId}`, {});
  }

  /** Begins to watch; `ended` resolves when the stream is over, also when it breaks. */
  async watch(intakeId: number): Promise<{ ended: Promise<void> }> {
    const answer = await fetch(this.url(`intakes/${intakeId}/events`), {
      headers: { authorization: `Bearer ${this.token}` },
    });
    const reader = answer.body?.getReader();
    await reader?.read();
    const drain = async (): Promise<void> => {
      while (!(await reader?.read())?.done);
    };
    return { ended: drain().catch(() => undefined) };
  }

  private async send<T>(path: string, init: RequestInit): Promise<T> {
    const answer = await fetch(this.url(path), { ...init, headers: { authorization: `Bearer ${this.token}` } });
    const body = (await answer.json()) as T;
    if (!answer.ok) throw new Error(`${path}: ${answer.status} ${JSON.stringify(body)}`);
    return body;
  }
}

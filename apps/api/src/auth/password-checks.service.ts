import { Inject, Injectable } from '@nestjs/common';
import { DomainError } from '@app/contracts';
import {
  type Database,
  deleteFailures,
  deleteFailuresBefore,
  type FailureRules,
  findPersonForSignIn,
  findPersonWithPassword,
  insertAccountEntry,
  type Person,
  type PersonWithPassword,
  upsertFailure,
} from '@app/data';
import { CLOCK, type Clock, DATABASE } from '@app/platform';
import { refuseBlocked } from './attempts';
import { isPasswordRight } from './passwords';

/** Five wrong passwords in a row, then a wait of 5 s that doubles with every further one, to a quarter of an hour. */
const RULES: FailureRules = {
  allowed: 5,
  firstDelaySeconds: 5,
  longestDelaySeconds: 900,
  forgottenAfterSeconds: 3600,
};

/** Compares passwords, at sign-in and under signatures, and makes guessing slow. */
@Injectable()
export class PasswordChecks {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    @Inject(CLOCK) private readonly clock: Clock,
  ) {}

  /** The person of this address and password; the same answer in the same time whichever of them is wrong. */
  async signIn(email: string, password: string, address: string): Promise<Person> {
    const person = await findPersonForSignIn(this.database, email);
    if (!(await this.check(email, person, password, address))) {
      if (person) await this.noteFailure(person, 'sign-in-failed', 'A sign-in', address);
      throw new DomainError('unauthenticated', 'sign-in-failed', 'The e-mail address or the password is wrong.');
    }
    return { id: person!.id, name: person!.name, email: person!.email };
  }

  /** The password given again under a signature. Call it before the transaction opens: wrong ones count even when nothing else is written. */
  async verifyPassword(personId: number, password: string, address?: string, pointer = '/password'): Promise<void> {
    const person = await findPersonWithPassword(this.database, personId);
    if (await this.check(person?.email ?? `#${personId}`, person, password, address)) return;
    if (person) await this.noteFailure(person, 'password-refused', 'A password given again', address);
    const detail = 'This is not your password.';
    throw new DomainError('invalid', 'wrong-password', detail, [{ pointer, code: 'wrong-password', detail }]);
  }

  /** Without an actor: whoever it was need not have been the person. */
  private async noteFailure(person: Person, action: string, what: string, address?: string): Promise<void> {
    const sentence = `${what} as ${person.name} failed: the password was wrong.`;
    await this.database.transaction((tx) =>
      insertAccountEntry(tx, person.id, { at: this.clock.now(), actor: null, action, sentence, address }),
    );
  }

  /**
   * The account's failure is counted before the password is compared and taken back when it was right, so that guesses sent
   * at the same time gain nothing. An address is counted afterwards: a plant's people share one, and sign in together.
   */
  private async check(
    email: string,
    person: PersonWithPassword | undefined,
    password: string,
    address: string | undefined,
  ): Promise<boolean> {
    const account = `account:${email.toLowerCase()}`;
    const place = address === undefined ? undefined : `address:${address}`;
    const subjects = place === undefined ? [account] : [account, place];
    const now = this.clock.now();
    await refuseBlocked(this.database, { subjects, now, ...TOO_MANY });
    if (!(await upsertFailure(this.database, account, now, RULES)))
      await refuseBlocked(this.database, { subjects, now, ...TOO_MANY, isSure: true });
    if (await isPasswordRight(password, person?.passwordHash)) {
      await deleteFailures(this.database, account);
      await deleteFailuresBefore(this.database, new Date(now.getTime() - 2 * RULES.forgottenAfterSeconds * 1000));
      return true;
    }
    if (place !== undefined) await upsertFailure(this.database, place, now, RULES);
    return false;
  }
}

const TOO_MANY = { code: 'too-many-wrong-passwords', what: 'Too many wrong passwords' };

/** Refuses the passwords that a guesser tries first. Length is the contract's matter; composition is nobody's. */
import { DEMO_ACCOUNTS } from '@/server/db/seeds/demo-accounts';
import { invalidField } from '@/server/http/problem';

const LEAST_DIFFERENT_SIGNS = 5;

export interface PasswordOwner {
  email: string;
  displayName: string;
}

export function refuseGuessable(password: string, { email, displayName }: PasswordOwner): void {
  const plain = password.toLowerCase().trim();
  const ownWords = [email, displayName, `${displayName} ${displayName}`].map((word) => word.toLowerCase());
  if (ownWords.includes(plain))
    throw invalidField('password', 'This is your name or address; choose another');
  if (new Set(plain).size < LEAST_DIFFERENT_SIGNS)
    throw invalidField('password', 'This repeats too few signs; a few words are good');
  if (DEMO_ACCOUNTS.some((account) => account.password === plain))
    throw invalidField('password', 'This password is printed in the demonstration; choose another');
}

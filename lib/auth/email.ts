import { z } from 'zod';

/** The form in which e-mails are stored and compared. */
export function normalEmail(email: string): string {
  return email.trim().normalize('NFC').toLowerCase();
}

/** An e-mail typed by a person. */
export const emailInput = z
  .string()
  .max(254, 'This is too long for an e-mail.')
  .transform(normalEmail)
  .pipe(z.email('This is not an e-mail address.'));

/** A person's or a thing's name typed by a person: one line, not empty. */
export const nameInput = z
  .string()
  .transform((text) => text.normalize('NFC').replace(/\s+/gu, ' ').trim())
  .pipe(z.string().min(1, 'Please write something here.').max(120, 'Please keep it under 120 characters.'));

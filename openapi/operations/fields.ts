/** Fields that several operations share. */
import { z } from '../zod';

export const dateTime = (description: string, example = '2026-12-01T09:30:00.000Z') =>
  z.iso.datetime().max(35).meta({ description, examples: [example] });

/** A moment to search by: any offset, and a year of four digits also in UTC, as the database needs it. */
export const moment = (description: string, example: string) =>
  z.iso.datetime({ offset: true }).regex(/^(?!0|9999)/).max(35).meta({ description, examples: [example] });

/** A line of text that comes back as it was sent: no control characters, no half of a surrogate pair. */
const noControlCharacters = /^[^\p{Cc}\p{Cs}]*$/u;
// The document's patterns are Unicode ones by definition; the generator would write the flag into the pattern.
export const lineOfText = () => z.string().regex(noControlCharacters).openapi({ pattern: noControlCharacters.source });

export const optionalDateTime = (description: string) => z.union([dateTime(description), z.null()]).meta({ description, examples: ['2027-01-01T00:00:00.000Z'] });

export const units = (description: string, example = 1200) =>
  z.number().int().min(0).max(1e15).meta({ description, examples: [example] });

export const keyId = z
  .string()
  .regex(/^[0-9A-Za-z]{8}$/)
  .meta({ description: 'The eight characters after `lw_live_` that name a key; not secret.', examples: ['jIu9aR5U'] });

export const callId = z
  .string()
  .regex(/^call_[0-9A-HJKMNP-TV-Z]{26}$/)
  .meta({ description: 'Identifies one logged call.', examples: ['call_01JE0T3M9ZC7V5Q2R8W4XKDNBH'] });

export const cursor = z
  .string()
  .max(500)
  .meta({ description: 'Where the next page starts, as the last answer gave it.', examples: ['eyJhdCI6MX0.c2ln'] });

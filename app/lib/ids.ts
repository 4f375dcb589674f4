// Opaque ids and secret tokens, from the platform's cryptographic random source. Letters and digits only, so that an id
// is one word to a double click and safe in an address, a file name, a CSS selector and a command line.
import { customAlphabet } from "nanoid";

const alphabet = "0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz";

/** A row's id: 22 characters, 130 random bits. Unguessable, yet never a permission in itself. */
export const newId: () => string = customAlphabet(alphabet, 22);

/** A bearer secret (session, invitation, reset, link): 43 characters, 256 random bits. Only its hash is stored. */
export const newToken: () => string = customAlphabet(alphabet, 43);

/** A short id for one request, printed in the log and on the error page: 10 characters. */
export const newTraceId: () => string = customAlphabet("0123456789abcdefghjkmnpqrstvwxyz", 10);

// What a password must be. Length, not composition: NIST SP 800-63B-4, section 3.1.1.2 (15 characters for a password that
// stands alone, no composition rules, no rotation, common ones refused).
import { fits, mostBytes } from "#app/lib/auth/hash.server";

export const leastCharacters = 15;

// Long ones that people pick first, from memory; published lists hold few of this length. Compared without case and spaces.
const common = new Set(
  `passwordpassword password12345678 passwordpassword1 password123password 123456789012345 1234567890123456 12345678901234567890
  0123456789012345 987654321098765 qwertyuiopasdfg qwertyuiopasdfgh qwertyuiopasdfghjkl qwertyuiopasdfghjklzxcvbnm qwerty1234567890
  1q2w3e4r5t6y7u8i 1q2w3e4r5t6y7u8i9o0p 1qaz2wsx3edc4rfv 1qaz2wsx3edc4rfv5tgb zaq12wsxcde34rfv abcdefghijklmno abcdefghijklmnop
  abcdefghijklmnopqrstuvwxyz abc123abc123abc123 iloveyouiloveyou iloveyouforever letmeinletmein1 letmeinletmeinletmein welcomewelcome1
  administrator123 administratoradministrator changemechangeme correcthorsebatterystaple thequickbrownfox thequickbrownfoxjumps
  ilovemyairplane ilovemyaircraft clearedfortakeoff bladecountbladecount`.split(/\s+/),
);

export type PasswordVerdict = { ok: true } | { ok: false; message: string };

/** Whether a new password may be used by the person with this name and address. The message says what to do instead. */
export function judgePassword(password: string, person: { name: string; email: string }): PasswordVerdict {
  const refuse = (message: string): PasswordVerdict => ({ ok: false, message });
  if ([...password].length < leastCharacters) {
    return refuse(`Use at least ${leastCharacters} characters. Four or five words that do not belong together are easy to remember.`);
  }
  if (!fits(password)) return refuse(`This password is longer than ${mostBytes} bytes, which is as much as is checked. Use a shorter one.`);
  const plain = password.toLowerCase().replaceAll(/\s/g, "");
  if (common.has(plain)) return refuse("This password is on the lists that are tried first. Choose another.");
  if (isRepeated(plain)) return refuse("This password repeats one short piece. Choose one that does not.");
  const own = [person.email, person.email.split("@")[0] ?? "", ...person.name.split(/\s+/), "bladecount"].map((p) => p.toLowerCase());
  const rest = own.filter((p) => p.length >= 4).reduce((left, piece) => left.replaceAll(piece, ""), plain);
  if (rest.length < 8) return refuse("This password is little more than your name or address. Choose one that others would not guess.");
  return { ok: true };
}

/** One piece of at most four characters, over and over. */
function isRepeated(text: string): boolean {
  for (let size = 1; size <= 4; size++) {
    const piece = text.slice(0, size);
    if (text === piece.repeat(Math.ceil(text.length / size)).slice(0, text.length)) return true;
  }
  return false;
}

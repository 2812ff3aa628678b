import { NewPassword } from '@shared/contract';
import { Invalid } from '../../middleware/problems';

/** Commonest passwords of at least 8 characters and words of the trade; from memory, in lower case. */
const COMMON = new Set(
  (
    'password password1 password12 password123 passw0rd p@ssw0rd p@ssword 12345678 123456789 1234567890 87654321 11111111 ' +
    '00000000 12341234 123123123 qwertyui qwerty12 qwerty123 qwertyuiop 1q2w3e4r 1qaz2wsx zaq12wsx asdfghjk asdfghjkl ' +
    'abcd1234 abc12345 a1b2c3d4 iloveyou sunshine princess football baseball superman batman123 starwars trustno1 ' +
    'whatever computer internet michelle jennifer letmein1 letmein123 welcome1 welcome123 admin123 administrator ' +
    'changeme changeme1 default1 secret123 monkey123 dragon123 master123 shadow123 summer2024 summer2025 winter2024 ' +
    'winter2025 spring2025 autumn2025 deltaproof propulsion spacecraft antimatter annihilation requirement requirements'
  ).split(' '),
);
const LONGEST_RUN_SHARE = 0.5;

/** Throws Invalid when a password is too short, among the commonest, made of one repeated or counted run, or the person's own name or address. */
export function assertGoodPassword(password: string, person: { readonly name: string; readonly email: string }): void {
  const parsed = NewPassword.safeParse(password);
  const fault = parsed.success ? faultOf(password, person) : (parsed.error.issues[0]?.message ?? 'is not accepted');
  if (fault !== null) {
    throw new Invalid([
      {
        field: 'password',
        message: fault,
        expected: '8 to 128 characters that others would not guess, such as four unrelated words',
      },
    ]);
  }
}

function faultOf(password: string, person: { readonly name: string; readonly email: string }): string | null {
  const lower = password.toLowerCase();
  if (COMMON.has(lower) || COMMON.has(lower.replace(/[!.?0-9]+$/, ''))) return 'is one of the commonest passwords';
  if (new Set(lower).size < 4) return 'repeats the same few characters';
  if (longestRun(lower) > lower.length * LONGEST_RUN_SHARE && lower.length < 16)
    return 'is mostly a run such as 12345 or abcde';
  const own = [person.email, person.email.split('@')[0] ?? '', person.name.replace(/\s+/g, '')].map((part) =>
    part.toLowerCase(),
  );
  if (own.some((part) => part.length > 2 && lower.replace(/[^a-z@.]+/g, '') === part.replace(/[^a-z@.]+/g, ''))) {
    return 'is your own name or address';
  }
  return null;
}

/** Length of the longest run of characters that count up or down by one. */
function longestRun(text: string): number {
  let longest = 1;
  let run = 1;
  let direction = 0;
  for (let index = 1; index < text.length; index += 1) {
    const step = text.charCodeAt(index) - text.charCodeAt(index - 1);
    const counts = Math.abs(step) === 1;
    run = counts && step === direction ? run + 1 : counts ? 2 : 1;
    direction = counts ? step : 0;
    longest = Math.max(longest, run);
  }
  return longest;
}

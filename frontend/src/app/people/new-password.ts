/** Shortest password that the server takes. */
export const PASSWORD_MIN = 8;

/** What is wrong with a new password as typed twice; empty when nothing is. */
export function passwordProblem(
  password: string,
  again: string,
): { readonly password: string; readonly again: string } {
  return {
    password:
      password.length < PASSWORD_MIN
        ? `This has ${password.length} characters. Use at least ${PASSWORD_MIN}; any characters will do.`
        : '',
    again: again === password ? '' : 'This differs from the password above. Type the same one again.',
  };
}

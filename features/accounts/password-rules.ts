/** What a password must be, in words. Pure, so that a form can say it before it is sent. */

export const SHORTEST_PASSWORD_CHARACTERS = 10;
const LONGEST_PASSWORD_CHARACTERS = 200;

/** Words guessers put first, alone or with digits and signs around them. Written from memory of leaked lists. */
const FIRST_GUESSES = new Set(
  (
    'password passwort passw0rd passwordpassword mypassword qwerty qwertyuiop qwertyuiopasdf asdfghjkl zxcvbnm letmein ' +
    'welcome welcomeback iloveyou monkey dragon sunshine princess football baseball basketball superman batman admin ' +
    'administrator changeme secret trustno abc abcd abcdef abcdefgh abcdefghij qazwsx qazwsxedc starwars whatever ' +
    'soybean soybeans soybeanseed hilum farmer farming johndeere tractor harvest corn cornbelt seedcorn'
  ).split(' '),
);

/** Letters alone, lower case: "Soybeans-2027!" is guessed as "soybeans". */
function lettersOf(text: string): string {
  return text.toLowerCase().replace(/[^a-z]/g, '');
}

/**
 * What is wrong with a password, in words that say what to do; `null` when nothing is.
 * `email`, where known, is refused as the password or as nearly all of it.
 */
export function passwordProblem(password: string, email?: string): string | null {
  if (password.length < SHORTEST_PASSWORD_CHARACTERS)
    return `Use at least ${SHORTEST_PASSWORD_CHARACTERS} characters. A few unrelated words are easy to keep and hard to guess.`;
  if (password.length > LONGEST_PASSWORD_CHARACTERS) return `Use at most ${LONGEST_PASSWORD_CHARACTERS} characters.`;
  if (new Set(password).size < 5) return 'Use at least 5 different characters.';
  const letters = lettersOf(password);
  if (FIRST_GUESSES.has(letters) || /^[\d\W_]+$/.test(password))
    return 'This is one of the first passwords a guesser tries. Choose another.';
  if (email && isMadeOf(password.toLowerCase(), email.toLowerCase()))
    return 'This is your e-mail address, or nearly. Choose something that is not.';
  return null;
}

/** Is the password the e-mail or its name part, give or take fewer than 4 characters? */
function isMadeOf(password: string, email: string): boolean {
  const name = email.split('@')[0] ?? '';
  return [email, name].some((part) => part.length >= 5 && password.includes(part) && password.length - part.length < 4);
}

/**
 * Remembers the last answers of a pure function whose inputs change more rarely than it is asked: the stray field while
 * a load is being typed. The answers are those of the function, so nothing is seen of it but the time.
 *
 * @param keyOf text that says all that the answer depends on
 * @param most answers kept; the one asked longest ago goes first
 */
export function remembered<Input, Answer>(
  compute: (input: Input) => Answer,
  keyOf: (input: Input) => string,
  most = 32,
): (input: Input) => Answer {
  const answers = new Map<string, Answer>();
  return (input) => {
    const key = keyOf(input);
    const known = answers.get(key);
    if (known !== undefined) {
      answers.delete(key);
      answers.set(key, known);
      return known;
    }
    const answer = compute(input);
    answers.set(key, answer);
    if (answers.size > most) {
      for (const oldest of answers.keys()) {
        answers.delete(oldest);
        break;
      }
    }
    return answer;
  };
}

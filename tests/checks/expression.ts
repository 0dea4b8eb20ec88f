/**
 * Value of a printed formula such as `sqrt(6)(2B + C)` or `-5B - 0.8D`: sums, products (the sign may be left out) and
 * square roots of numbers and of the symbols given.
 */
export function evaluate(text: string, symbols: Record<string, number>): number {
  const tokens = text.match(/\d+(?:\.\d+)?|[A-Za-z_]+|[()+*/-]/g) ?? [];
  let at = 0;
  const sum = (): number => {
    let value = 0;
    let sign = 1;
    while (at < tokens.length && tokens[at] !== ')') {
      if (tokens[at] === '+' || tokens[at] === '-') sign = tokens[at++] === '-' ? -1 : 1;
      value += sign * product();
    }
    return value;
  };
  const product = (): number => {
    let value = factor();
    while (at < tokens.length && !['+', '-', ')'].includes(tokens[at]!)) {
      if (tokens[at] === '/') {
        at++;
        value /= factor();
      } else {
        if (tokens[at] === '*') at++;
        value *= factor();
      }
    }
    return value;
  };
  const factor = (): number => {
    const token = tokens[at++]!;
    if (token === '(') {
      const value = sum();
      at++;
      return value;
    }
    if (token === 'sqrt') return Math.sqrt(factor());
    const value = symbols[token] ?? Number(token);
    if (Number.isNaN(value)) throw new Error(`Cannot read ${token} in ${text}`);
    return value;
  };
  return sum();
}

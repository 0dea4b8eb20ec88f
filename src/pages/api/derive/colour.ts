import { colourOfSolution } from '#src/chem/colour/index.ts';
import { routes } from '#src/contracts/routes.ts';
import { endpoint } from '#src/server/endpoint.ts';
import { HttpError } from '#src/server/http.ts';

export const POST = endpoint(routes.deriveColour, {
  act: ({ body: { x, epsilon, ...conditions } }) => {
    const order = x.map((_, i) => i).sort((a, b) => x[a]! - x[b]!);
    const colour = colourOfSolution({
      x: Float64Array.from(order, (i) => x[i]!),
      epsilon: Float64Array.from(order, (i) => epsilon[i] ?? Number.NaN),
      ...conditions,
    });
    if (!colour)
      throw new HttpError(422, 'No colour: the spectrum covers too little of 400 to 700 nm', {
        errors: [
          { pointer: '#/x', detail: 'The range should reach from 700 nm (14 286 cm⁻¹) to 400 nm (25 000 cm⁻¹)' },
        ],
      });
    return colour;
  },
});

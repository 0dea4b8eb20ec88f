/**
 * Spin-pairing energy of dᵠ with total spin S, against the average of the configuration: D [⟨S(S+1)⟩ − S(S+1)] with
 * ⟨S(S+1)⟩ = ¾ q (1 − (q − 1)/9).
 *
 * @param electrons - q, 0 to 10
 * @param unpaired - 2S
 * @returns the energy in units of D
 * @see C. K. Jørgensen, Orbitals in Atoms and Molecules, 1962, ch. 7 (from memory)
 */
export function spinPairingInD(electrons: number, unpaired: number): number {
  const average = 0.75 * electrons * (1 - (electrons - 1) / 9);
  const spin = unpaired / 2;
  return average - spin * (spin + 1);
}

/** The spin-pairing parameter D = 7/6 (5/2 B + C) in cm⁻¹; C is taken as 4B unless given. */
export const spinPairingParameter = (B: number, C = 4 * B): number => (7 / 6) * (2.5 * B + C);

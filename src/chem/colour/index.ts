export { colourOfSolution, type SolutionColour, type SolutionSpectrum } from './solution.ts';
export { type ScreenColour, srgbDecode, srgbEncode, xyzToSrgb } from './srgb.ts';
export { chromaticity, colourMatching, illuminantD65, type Triple, tristimulus, whiteD65 } from './tristimulus.ts';
export { cielab, complementaryColour, nameColour } from './words.ts';

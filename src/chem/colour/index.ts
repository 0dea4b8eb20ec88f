export { colourOfSolution, type SolutionColour, type SolutionSpectrum } from './solution';
export { type ScreenColour, srgbDecode, srgbEncode, xyzToSrgb } from './srgb';
export { chromaticity, colourMatching, illuminantD65, type Triple, tristimulus, whiteD65 } from './tristimulus';
export { cielab, complementaryColour, nameColour } from './words';

/** The chemistry a reading needs, fetched by the browser after the page is drawn: the same modules the server reads by. */
export { NO_CAUTION_COMPUTED, NO_RULE_MATCHED, STANDING_SENTENCE } from '#src/chem/cautions/index.ts';
export { spinChoices } from '#src/chem/electrons.ts';
export { readFormula } from '#src/chem/formula/index.ts';
export { drawPolyhedron, findGeometry, isomersOf } from '#src/chem/geometry/index.ts';

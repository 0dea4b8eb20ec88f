import { isDBlock } from '../elements.ts';
import { DomainError } from '../errors.ts';
import { ligands as builtIn, indexLigands, type Ligand, type LigandIndex } from '../ligands/index.ts';
import { interpret, noMetal, unsettled } from './interpret.ts';
import { countLabels, takeLabels } from './isotopes.ts';
import { compositionOf } from './lexicon.ts';
import { formulaOfName } from './names.ts';
import { type NormalText, normalise } from './normalise.ts';
import { applyRepairs, mistypedMetal, type Repair, suspiciousTokens } from './repairs.ts';
import { type Component, parseSyntax } from './syntax.ts';
import type { Answers, Question, Reading } from './types.ts';

const builtInIndex = indexLigands(builtIn);

/**
 * Read the formula of a coordination compound: salt, entities, centres, ligands, charges, oxidation states.
 *
 * What is doubtful comes back as a question with choices, and null (NaN for a mass, empty for a list) in the values
 * that hang on it; `answers[code] = value` settles it.
 *
 * @param text - the formula as typed, at most 500 characters
 * @param answers - values chosen for questions of an earlier reading, by code
 * @param ownLigands - ligands of the asker beside the built-in library; where spellings meet, theirs are taken
 * @throws {DomainError} field `formula`, with the 0-based offset: `empty`, `too-large`, `unbalanced-bracket`,
 *   `malformed-hydrate`, `unknown-symbol`, `no-d-block-metal`, `f-block-metal`, `unreadable`
 */
export function readFormula(text: string, answers: Answers = {}, ownLigands: readonly Ligand[] = []): Reading {
  const library = ownLigands.length === 0 ? builtInIndex : indexLigands([...ownLigands, ...builtIn]);
  const labels = takeLabels(formulaOfName(text) ?? normalise(text), library);
  const { source } = labels;
  const components = parseSyntax(source); // brackets are judged before spelling
  const reading = readNormal(source, components, answers, library, text);
  return labels.found.length === 0 ? reading : { ...reading, isotopes: countLabels(labels, components) };
}

function readNormal(
  source: NormalText,
  components: readonly Component[],
  answers: Answers,
  library: LigandIndex,
  text: string,
): Reading {
  const suspicious = suspiciousTokens(source);
  if (suspicious.length > 0) {
    const value = [...new Set(suspicious.map((r) => r.token))].join(',');
    const question = repairQuestion(
      'suspicious-token',
      suspicious,
      value,
      `Is ${quoted(suspicious, 'typed')} meant to be ${quoted(suspicious, 'meant')}?`,
      source,
    );
    if (answers['suspicious-token'] !== value) return unsettled(text, question);
    return read(applyRepairs(source, suspicious), answers, library, text);
  }
  return read(source, answers, library, text, components);
}

const quoted = (repairs: readonly Repair[], key: 'typed' | 'meant') =>
  [...new Set(repairs.map((r) => r[key]))].join(', ');

function repairQuestion(
  code: string,
  repairs: readonly Repair[],
  value: string,
  detail: string,
  source: NormalText,
): Question {
  return {
    code,
    detail,
    choices: [{ value, label: `read as ${quoted(repairs, 'meant')}` }],
    position: source.at[repairs[0]?.start ?? 0],
  };
}

/** Read, and where that fails for want of a metal, look whether one was typed in the wrong case. */
function read(
  source: NormalText,
  answers: Answers,
  library: LigandIndex,
  typed: string,
  parsed: readonly Component[] = parseSyntax(source),
): Reading {
  try {
    return interpret(parsed, { source, library, answers }, typed);
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    const repair = mistypedMetal(source);
    if (!repair || (error.code !== 'unknown-symbol' && error.code !== 'no-d-block-metal'))
      throw plainError(error, source);
    const repaired = applyRepairs(source, [repair]);
    const reading = read(repaired, answers, library, typed); // throws what is wrong beside the metal
    if (answers[error.code] === repair.meant) return reading;
    const detail = `${error.message}. Is ${repair.typed} meant to be ${repair.meant}?`;
    return unsettled(typed, repairQuestion(error.code, [repair], repair.meant, detail, source));
  }
}

/** A plain molecule such as C6H12O6 is refused for want of a metal, not for its spelling. */
function plainError(error: DomainError, source: NormalText): DomainError {
  const composition = error.code === 'unknown-symbol' ? compositionOf(source.text) : null;
  if (!composition || Object.keys(composition).some(isDBlock)) return error;
  return noMetal(Object.keys(composition), 0);
}

import { type ProblemError, fieldSentence } from '../../core/http/problem-error';

/** Path of a refused field below the command: "lines[2].expression", "name". */
function pathOf(field: string): string {
  return field.replace(/^commands(\.\d+|\[\d+\])\./, '').replace(/^changes\./, '');
}

/** Why the server refused something at or below a path such as "inputs[1]"; empty when it did not. */
export function refusalAt(problem: ProblemError | null, path: string): string {
  const found = problem?.fields.find(({ field }) => {
    const at = normal(pathOf(field));
    return at === path || at.startsWith(`${path}.`) || at.startsWith(`${path}[`);
  });
  return found === undefined ? '' : fieldSentence(found);
}

/** Why the server refused a line; empty when it did not. */
export function lineRefusal(problem: ProblemError | null, index: number): string {
  return refusalAt(problem, `lines[${index}]`);
}

/** Schema refusals write inputs.1.name, rules inputs[1].name. */
function normal(path: string): string {
  return path.replace(/\.(\d+)(?=\.|$)/g, '[$1]');
}

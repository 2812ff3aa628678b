/** ESLint rules of this house that no published plugin has: import directions, and reasons beside every exception. */
import { dirname, posix, relative, resolve, sep } from 'node:path';

/**
 * Which part of the tree may import which. A part is the longest listed folder (or file) that a path begins with; a part
 * may always import itself. What is not listed under `may` is refused, so a new folder has to be given its place here.
 */
const parts = {
  'shared/src/contract': [],
  'shared/src/units': [],
  'shared/src/constants': ['shared/src/units'],
  'shared/src/formula': ['shared/src/units'],
  'shared/src/engine': ['shared/src/formula', 'shared/src/units'],
  'shared/src/methods': ['shared/src/units', 'shared/src/constants'],
  'shared/src/uncertainty': ['shared/src/engine', 'shared/src/formula', 'shared/src/units'],
  'shared/src/study': ['shared/src'],
  'shared/src': [],
  'shared/bench': ['shared/src'],

  'backend/src/platform': ['shared/src', 'backend/src/models'],
  'backend/src/models': ['shared/src'],
  'backend/src/mail': ['shared/src', 'backend/src/models', 'backend/src/platform'],
  'backend/src/live': ['shared/src', 'backend/src/models', 'backend/src/platform'],
  'backend/src/study': [
    ...['shared/src', 'backend/src/models', 'backend/src/platform'],
    // The path of a change answers in typed errors, knows who asks, and remembers its answer in its own transaction.
    ...['problems.ts', 'access.ts', 'idempotency.ts'].map((file) => `backend/src/middleware/${file}`),
  ],
  'backend/src/exports': ['shared/src', 'backend/src/study', 'backend/src/platform'],
  'backend/src/middleware/problems.ts': ['shared/src'],
  'backend/src/middleware': [
    ...['shared/src', 'backend/src/models', 'backend/src/platform', 'backend/src/services.ts'],
    'backend/src/middleware/problems.ts',
  ],
  'backend/src/services.ts': [
    'shared/src',
    'backend/src/study',
    'backend/src/live',
    'backend/src/mail',
    'backend/src/middleware',
    'backend/src/platform',
  ],
  'backend/src/features': [
    ...['shared/src', 'backend/src/study', 'backend/src/models', 'backend/src/platform', 'backend/src/middleware'],
    ...['backend/src/live', 'backend/src/mail', 'backend/src/exports', 'backend/src/services.ts'],
  ],
  'backend/src': ['shared/src', 'backend/src', 'database'],
  'backend/test': ['shared/src', 'backend/src', 'database'],
  database: ['shared/src', 'backend/src'],

  'frontend/src/app/ui': ['shared/src'],
  'frontend/src/app/core': ['shared/src', 'frontend/src/app/ui'],
  'frontend/src/app': ['shared/src', 'frontend/src/app'],
  'frontend/src': ['shared/src', 'frontend/src'],
  e2e: ['shared/src', 'database'],
};

/** A feature's own folder, its public file, and what every feature may use. */
const frontendFeature = /^frontend\/src\/app\/(?!ui\/|core\/)([^/]+)\//;
const featurePublicFile = /^frontend\/src\/app\/([^/]+)\/\1\.routes(\.ts)?$/;
/** Faces of their own beside a folder's index: what the client reads at run time without the schema library. */
const ownFaces = new Set(['@shared/contract/permissions']);
const testFile = /\.spec\.ts$|\/testing\/|^backend\/test\//;

const importDirection = {
  meta: {
    type: 'problem',
    schema: [],
    messages: {
      direction: '{{from}} must not import {{to}} (see the table in .lint/house-rules.mjs).',
      face: "Import another shared folder by its public face: '@shared/{{folder}}'.",
      inside: 'Inside a shared folder import by relative path, not by its public face.',
      feature: 'A feature reaches another feature only through its routes file.',
    },
  },
  create(context) {
    const file = relative(context.cwd, context.filename).split(sep).join('/');
    const check = (node) => {
      const source = node.source?.value;
      if (typeof source !== 'string') return;
      const target = targetOf(source, file);
      if (target === undefined) return;
      const folder = /^shared\/src\/([^/]+)/.exec(target)?.[1];
      const inSameFolder = folder !== undefined && file.startsWith(`shared/src/${folder}/`);
      if (source.startsWith('@shared/') && inSameFolder) return context.report({ node, messageId: 'inside' });
      const crossesIntoShared = folder !== undefined && !inSameFolder && !file.startsWith('shared/bench');
      if (crossesIntoShared && source !== `@shared/${folder}` && !ownFaces.has(source) && !testFile.test(file)) {
        return context.report({ node, messageId: 'face', data: { folder } });
      }
      const [fromFeature, toFeature] = [frontendFeature.exec(file)?.[1], frontendFeature.exec(target)?.[1]];
      if (
        fromFeature !== undefined &&
        toFeature !== undefined &&
        fromFeature !== toFeature &&
        !featurePublicFile.test(target)
      ) {
        return context.report({ node, messageId: 'feature' });
      }
      const [from, to] = [partOf(file), partOf(target)];
      if (from === to || testFile.test(file) || parts[from]?.some((allowed) => isWithin(target, allowed))) return;
      context.report({ node, messageId: 'direction', data: { from, to } });
    };
    return {
      ImportDeclaration: check,
      ImportExpression: check,
      ExportNamedDeclaration: check,
      ExportAllDeclaration: check,
    };
  },
};

/** Path of an import inside the repository, or undefined for a package. */
function targetOf(source, file) {
  if (source.startsWith('@shared/')) return `shared/src/${source.slice('@shared/'.length)}`;
  return source.startsWith('.') ? posix.join(posix.dirname(file), source) : undefined;
}

function partOf(path) {
  return Object.keys(parts)
    .filter((part) => isWithin(path, part))
    .sort((a, b) => b.length - a.length)[0];
}

function isWithin(path, part) {
  return path === part || `${path}.ts` === part || path.startsWith(`${part}/`);
}

const reasonForException = {
  meta: {
    type: 'problem',
    schema: [],
    messages: { reason: 'Say why, after " -- ": an exception without a reason cannot be judged later.' },
  },
  create(context) {
    return {
      Program() {
        for (const comment of context.sourceCode.getAllComments()) {
          const disables = /^\s*(eslint-disable|@ts-expect-error|@ts-ignore)/.test(comment.value);
          const reasoned = / -- \S|@ts-expect-error.{10,}/.test(comment.value);
          if (disables && !reasoned) context.report({ loc: comment.loc, messageId: 'reason' });
        }
      },
    };
  },
};

/** Every relative import names a file that exists is the compiler's business; here only the two rules above. */
export const house = { rules: { 'import-direction': importDirection, 'reason-for-exception': reasonForException } };

export const houseRoot = resolve(dirname(new URL(import.meta.url).pathname), '..');

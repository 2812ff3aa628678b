import { describe, it } from 'node:test';
import { RuleTester } from 'eslint';
import { join } from 'node:path';
import tseslint from 'typescript-eslint';
import { house, houseRoot } from './house-rules.mjs';

RuleTester.describe = describe;
RuleTester.it = it;
const tester = new RuleTester({ languageOptions: { parser: tseslint.parser } });
const at = (path, code) => ({ filename: join(houseRoot, path), code });
const refused = (messageId, path, code) => ({ ...at(path, code), errors: [{ messageId }] });

tester.run('import-direction', house.rules['import-direction'], {
  valid: [
    at('shared/src/engine/tape.ts', "import { parse } from '@shared/formula';"),
    at('shared/src/engine/tape.ts', "import { Op } from './operations';"),
    at('shared/src/study/prove.ts', "import { methods } from '@shared/methods';"),
    at('backend/src/features/people/people-routes.ts', "import { Person } from '../../models/person';"),
    at('frontend/src/app/overview/overview.ts', "import { VerdictMark } from '../ui/verdict/mark';"),
    at('frontend/src/app/overview/overview.ts', "import { routes } from '../changes/changes.routes';"),
    at('frontend/src/app/overview/overview.ts', "import { Component } from '@angular/core';"),
    at('backend/src/models/person.spec.ts', "import { app } from '../app';"),
  ],
  invalid: [
    refused('direction', 'shared/src/engine/tape.ts', "import { methods } from '@shared/methods';"),
    refused('direction', 'shared/src/contract/commands.ts', "import type { Unit } from '@shared/units';"),
    refused('direction', 'shared/src/units/parse.ts', "export * from '@shared/formula';"),
    refused('direction', 'backend/src/models/person.ts', "import { routes } from '../features';"),
    refused('direction', 'frontend/src/app/ui/mark.ts', "import { Session } from '../core/session/session';"),
    refused('direction', 'frontend/src/app/core/shell/shell.ts', "const page = import('../../people/people');"),
    refused('face', 'backend/src/study/ledger.ts', "import { Study } from '@shared/study/study';"),
    refused('face', 'shared/src/study/prove.ts', "import { compile } from '../engine/compile';"),
    refused('inside', 'shared/src/units/parse.ts', "import { Unit } from '@shared/units';"),
    refused('feature', 'frontend/src/app/overview/overview.ts', "import { Changes } from '../changes/changes';"),
  ],
});

tester.run('reason-for-exception', house.rules['reason-for-exception'], {
  valid: [
    at('a.ts', '// eslint-disable-next-line eqeqeq -- null and undefined mean the same here\na == b;'),
    at('a.ts', '// @ts-expect-error the library declares too little\na.b();'),
  ],
  invalid: [
    refused('reason', 'a.ts', '// eslint-disable-next-line eqeqeq\na == b;'),
    refused('reason', 'a.ts', '// @ts-ignore\na.b();'),
  ],
});

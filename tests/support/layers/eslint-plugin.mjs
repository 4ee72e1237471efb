/** The import rule for ESLint: shown in the editor, and by `npm run lint`. */
import path from 'node:path';
import { checkImport, ROOT } from './layers.mjs';

const imports = {
  meta: { type: 'problem', schema: [], messages: { layer: '{{why}} (tests/support/layers/layers.json)' } },
  create(context) {
    const file = path.relative(ROOT, context.filename).split(path.sep).join('/');
    const check = (node) => {
      const specifier = node?.value;
      const why = typeof specifier === 'string' ? checkImport(file, specifier) : undefined;
      if (why) context.report({ node, messageId: 'layer', data: { why } });
    };
    return {
      ImportDeclaration: ({ source }) => check(source),
      ExportAllDeclaration: ({ source }) => check(source),
      ExportNamedDeclaration: ({ source }) => check(source),
      ImportExpression: ({ source }) => check(source),
      TSImportType: ({ source, argument }) => check(source ?? argument?.literal),
    };
  },
};

const plugin = { rules: { imports } };

export default plugin;

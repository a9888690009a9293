import { ESLint } from 'eslint';
import { mkdirSync, mkdtempSync, realpathSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';
import tseslint from 'typescript-eslint';

const config = join(import.meta.dirname, '..', '..', 'eslint.config.mjs');

/**
 * The project's folders with empty files in them, in a folder of its own, under the project's lint. So the
 * whole table of imports can be tried, also for parts that are not written yet, without touching a source.
 */
export class ProjectOnPaper {
  private readonly root = realpathSync(mkdtempSync(join(tmpdir(), 'tareline-lint-')));
  private readonly eslint: ESLint;

  /** @param files paths from the root, each made as an empty module */
  constructor(files: readonly string[]) {
    for (const file of files) {
      mkdirSync(dirname(join(this.root, file)), { recursive: true });
      writeFileSync(join(this.root, file), 'export {};\n');
    }
    writeFileSync(
      join(this.root, 'tsconfig.json'),
      '{ "compilerOptions": { "moduleResolution": "bundler" } }',
    );
    this.eslint = new ESLint({
      cwd: this.root,
      overrideConfigFile: config,
      overrideConfig: [
        {
          // Rules that ask the compiler need real programs; none of them is tried here.
          files: ['**/*.ts'],
          ...tseslint.configs.disableTypeChecked,
        },
        {
          settings: {
            'boundaries/root-path': this.root,
            'import/resolver': { typescript: { project: [join(this.root, 'tsconfig.json')] } },
          },
        },
      ],
    });
  }

  /**
   * @param file path from the root
   * @param text what stands in the file
   * @returns the rules that the text breaks there, each once, in alphabetical order
   */
  async brokenRules(file: string, text: string): Promise<string[]> {
    const results = await this.eslint.lintText(text, { filePath: join(this.root, file) });
    const rules = results.flatMap(({ messages }) =>
      messages.map(({ ruleId, message }) => ruleId ?? `no rule: ${message}`),
    );
    return [...new Set(rules)].sort();
  }

  /** Removes the folder. */
  discard(): void {
    rmSync(this.root, { recursive: true });
  }
}

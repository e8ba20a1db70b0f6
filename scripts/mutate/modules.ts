import { readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { compileFunction } from 'node:vm';
import ts from 'typescript';
import { ROOT } from './root';

type Exports = Record<string, unknown>;
type Body = (exports: Exports, require: (name: string) => unknown, url: string) => void;
type Module = { path: string; body: Body; imports: ReadonlyMap<string, string> };
/** A file of the repository with other text than it has. */
export type Replaced = { path: string; source: string };

/**
 * The project's own modules as functions, so that one of them can be replaced and those that need it started anew in
 * milliseconds, the code of all others staying compiled. Packages are imported once and shared.
 */
export class Modules {
  private readonly modules = new Map<string, Module>();
  private readonly packages = new Map<string, unknown>();
  private readonly shared = new Map<string, Exports>();

  /** `given` stands in for packages. */
  constructor(given: Readonly<Record<string, unknown>>) {
    for (const [name, exports] of Object.entries(given)) this.packages.set(name, exports);
  }

  /** Reads a file and all that it imports. */
  async read(path: string): Promise<void> {
    if (this.modules.has(path)) return;
    const module = path.endsWith('.json') ? readJson(path) : compile(path, readFileSync(path, 'utf8'));
    this.modules.set(path, module);
    for (const [name, target] of module.imports) {
      if (target) await this.read(target);
      else if (!this.packages.has(name))
        this.packages.set(name, { __esModule: true, ...(await import(name)) });
    }
  }

  /** Every file that needs the given one, itself included. */
  dependentsOf(path: string): Set<string> {
    const found = new Set([path]);
    for (const known of found) {
      for (const { path: other, imports } of this.modules.values()) {
        if ([...imports.values()].includes(known)) found.add(other);
      }
    }
    return found;
  }

  /** How to load files while one is replaced: what needs it is made anew for this loader, once. Throws where it does not parse. */
  loader(replaced?: Replaced): (path: string) => Exports {
    const own = new Map<string, Exports>();
    const changed = replaced && compile(replaced.path, replaced.source);
    const anew = replaced ? this.dependentsOf(replaced.path) : new Set<string>();
    const load = (path: string): Exports => {
      const made = anew.has(path) ? own : this.shared;
      const known = made.get(path);
      if (known) return known;
      const module = changed?.path === path ? changed : this.modules.get(path)!;
      const exports: Exports = {};
      made.set(path, exports);
      const require = (name: string) => {
        const target = module.imports.get(name);
        return target ? load(target) : this.packages.get(name);
      };
      module.body(exports, require, pathToFileURL(path).href);
      return exports;
    };
    return load;
  }
}

function compile(path: string, source: string): Module {
  const { outputText } = ts.transpileModule(source.replaceAll('import.meta.url', '__url'), {
    compilerOptions: {
      module: ts.ModuleKind.CommonJS,
      target: ts.ScriptTarget.ES2022,
      esModuleInterop: true,
    },
  });
  const names = [...outputText.matchAll(/\brequire\(["']([^"']+)["']\)/g)].map(([, name]) => name!);
  return {
    path,
    body: compileFunction(outputText, ['exports', 'require', '__url'], { filename: path }) as Body,
    imports: new Map(names.map((name) => [name, fileOf(name, path)])),
  };
}

function readJson(path: string): Module {
  const value: unknown = JSON.parse(readFileSync(path, 'utf8'));
  return {
    path,
    body: (exports) => Object.assign(exports, { __esModule: true, default: value }),
    imports: new Map(),
  };
}

/** The file that a name means; empty for a package. */
function fileOf(name: string, from: string): string {
  const path = name.startsWith('@/')
    ? join(ROOT, 'src', name.slice(2))
    : name.startsWith('.')
      ? join(dirname(from), name)
      : '';
  return path === '' || path.endsWith('.json') ? path : `${path}.ts`;
}

import { readFileSync } from 'node:fs';
import path from 'node:path';

const root = path.resolve(import.meta.dirname, '../..');

/** @type {Record<string, string>} the aliases of package.json, '#planner/*' -> './server/planner/*' */
const aliases = JSON.parse(readFileSync(path.join(root, 'package.json'), 'utf8')).imports;

const webServer = ['express', 'express-session', 'passport', 'passport-local', 'connect-pg-simple', 'helmet'];
const mailers = ['nodemailer', 'smtp-server', 'mailparser', '@react-email/components', '@react-email/render'];
const database = ['knex', 'pg'];
const nodeOnly = ['node:', ...webServer, ...mailers, ...database, 'pino', 'pino-http', 'node-cron'];

const pure = ['planner', 'chemistry', 'sheets', 'contracts'];
const kernel = ['errors', 'deps', ...pure];
/**
 * One row per layer; the first whose `at` matches a file's path names its layer. `mayUse` lists the layers it may import
 * beside itself. `only` lists the packages it may import, `never` those it may not ('node:' stands for all of Node).
 * @typedef {{ name: string, at: RegExp, mayUse: string[], only?: string[], never?: string[] }} Layer
 */
/** @type {Layer[]} */
export const layers = [
  { name: 'contracts', at: /^contracts\//, mayUse: [], only: ['zod'] },
  { name: 'planner', at: /^server\/planner\//, mayUse: [], only: [] },
  { name: 'chemistry', at: /^server\/chemistry\//, mayUse: [], only: [] },
  { name: 'sheets', at: /^server\/sheets\//, mayUse: ['contracts', 'chemistry'], only: [] },
  {
    name: 'errors',
    at: /^server\/(errors|policies|config)\.ts$/,
    mayUse: ['contracts'],
    never: [...webServer, ...mailers],
  },
  {
    name: 'deps',
    at: /^server\/deps\.ts$/,
    mayUse: ['errors', ...pure, 'db', 'planning', 'mail', 'realtime', 'storage'],
    never: webServer,
  },
  { name: 'storage', at: /^server\/storage\//, mayUse: ['errors'], never: [...webServer, ...mailers, ...database] },
  {
    name: 'program',
    at: /^server\/program\.ts$/,
    mayUse: [...kernel, 'db', 'storage'],
    never: [...webServer, ...mailers],
  },
  { name: 'db', at: /^server\/db\//, mayUse: [...kernel, 'migrations'], never: [...webServer, ...mailers] },
  { name: 'csv', at: /^server\/csv\//, mayUse: ['contracts', 'db'], never: [...webServer, ...mailers] },
  { name: 'starter', at: /^server\/starter\//, mayUse: pure, only: [] },
  { name: 'planning', at: /^server\/planning\//, mayUse: [...kernel, 'db'], never: [...webServer, ...mailers] },
  { name: 'mail', at: /^server\/mail\//, mayUse: [...kernel, 'db'], never: webServer },
  { name: 'realtime', at: /^server\/realtime\//, mayUse: [...kernel, 'db'], never: mailers },
  {
    name: 'services',
    at: /^server\/services\//,
    mayUse: [...kernel, 'db', 'csv', 'planning', 'starter', 'storage'],
    never: [...webServer, ...mailers],
  },
  {
    name: 'http',
    at: /^server\/http\//,
    mayUse: [...kernel, 'services', 'realtime'],
    never: [...database, ...mailers],
  },
  {
    name: 'jobs',
    at: /^jobs\//,
    mayUse: [...kernel, 'program', 'services', 'mail', 'db', 'planning', 'realtime', 'storage', 'seeds'],
    never: webServer,
  },
  { name: 'migrations', at: /^migrations\//, mayUse: [], only: ['knex'] },
  {
    name: 'seeds',
    at: /^seeds\//,
    mayUse: [...kernel, 'db', 'services', 'planning', 'starter'],
    never: [...webServer, ...mailers],
  },
  { name: 'browser paths', at: /^src\/app\/paths\.ts$/, mayUse: ['contracts'], never: nodeOnly },
  { name: 'browser lib', at: /^src\/lib\//, mayUse: ['contracts', 'planner', 'browser paths'], never: nodeOnly },
  { name: 'browser ui', at: /^src\/ui\//, mayUse: ['browser lib'], never: nodeOnly },
  {
    name: 'browser feature',
    at: /^src\/features\//,
    mayUse: ['contracts', 'planner', 'chemistry', 'sheets', 'browser lib', 'browser ui', 'browser paths'],
    never: nodeOnly,
  },
  {
    name: 'browser app',
    at: /^src\//,
    mayUse: ['contracts', 'planner', 'browser lib', 'browser ui', 'browser paths', 'browser feature'],
    never: nodeOnly,
  },
];

/** @param {string} file path from the project's root */
function layerOf(file) {
  const layer = layers.find(({ at }) => at.test(file));
  if (layer?.name !== 'browser feature') return layer;
  // Features never import each other: each folder is a layer of its own.
  return { ...layer, name: `browser feature ${file.split('/')[2] ?? ''}` };
}

/**
 * Where an import leads: a path from the project's root, or `null` for a package.
 * @param {string} from importing file, path from the root @param {string} specifier
 */
function target(from, specifier) {
  if (specifier.startsWith('.')) return path.posix.join(path.posix.dirname(from), specifier);
  for (const [alias, to] of Object.entries(aliases)) {
    const prefix = alias.slice(0, -1);
    if (specifier.startsWith(prefix)) return path.posix.join(to.slice(0, -1), specifier.slice(prefix.length));
  }
  return null;
}

/** @param {string[]} names @param {string} specifier */
const lists = (names, specifier) =>
  names.some((name) => specifier === name || specifier.startsWith(name.endsWith(':') ? name : `${name}/`));

/**
 * The complaint about one import, or `undefined` when it is allowed.
 * @param {string} from importing file, path from the root @param {string} specifier
 */
export function crossing(from, specifier) {
  const layer = layerOf(from);
  if (!layer) return undefined;
  const file = target(from, specifier);
  if (file === null) {
    const refused = layer.only ? !lists(layer.only, specifier) : lists(layer.never ?? [], specifier);
    return refused ? `${layer.name} may not import the package ${specifier}.` : undefined;
  }
  const other = layerOf(file);
  if (other?.name === layer.name) return undefined;
  if (other && layer.mayUse.some((name) => other.name === name)) return undefined;
  if (other?.name.startsWith('browser feature') && layer.mayUse.includes('browser feature')) return undefined;
  return `${layer.name} may not import ${other ? `from ${other.name}` : file}.`;
}

/** @type {import('eslint').Rule.RuleModule} */
const rule = {
  meta: { type: 'problem', schema: [], docs: { description: 'Imports run one way between the layers.' } },
  create(context) {
    // A kept bad example lies in tests/borders/fixture-NAME/ at the path it pretends to have.
    const from = path
      .relative(root, context.filename)
      .split(path.sep)
      .join('/')
      .replace(/^tests\/borders\/fixture-[^/]+\//, '');
    /** @param {{ source?: import('estree').Node | null | undefined }} node */
    const check = ({ source }) => {
      if (source?.type !== 'Literal' || typeof source.value !== 'string') return;
      const message = crossing(from, source.value);
      if (message) context.report({ node: source, message });
    };
    return {
      ImportDeclaration: check,
      ExportNamedDeclaration: check,
      ExportAllDeclaration: check,
      ImportExpression: check,
    };
  },
};

export const borders = { rules: { 'one-way': rule } };

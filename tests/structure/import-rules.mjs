/**
 * Who may import whom. One list for the linter (which sees one file) and for the test over the whole import graph
 * (which resolves every path and so cannot be fooled by a relative one).
 *
 * files: where the rule holds · except: where it does not · never: folders of ours · allow: what is let through all the
 * same · packages: npm packages · onlyFolders, onlyPackages: a complete list instead (the graph test alone reads these).
 */
const SERVER_ONLY = ['pg', 'kysely', 'pg-boss', 'nodemailer', '@node-rs/argon2', 'smtp-server', 'mailparser'];
const FRAMEWORK = ['next', 'next-auth', 'react', 'react-dom'];

export const importRules = [
  {
    files: ['lib/physics/**/*.ts'],
    onlyFolders: ['lib/physics'],
    onlyPackages: [],
    never: ['app', 'components', 'db', 'lib/*'],
    allow: ['lib/physics'],
    packages: [...FRAMEWORK, ...SERVER_ONLY, 'zod', 'konva'],
    why: 'The physics imports nothing but itself, so that it runs and is proven anywhere.',
  },
  {
    files: ['lib/domain/**/*.ts'],
    onlyFolders: ['lib/domain', 'lib/physics'],
    onlyPackages: [],
    never: ['app', 'components', 'db', 'lib/services', 'lib/schemas', 'lib/auth', 'lib/http', 'lib/mail', 'lib/jobs', 'lib/ops', 'lib/env'],
    packages: [...FRAMEWORK, ...SERVER_ONLY, 'zod', 'konva'],
    why: 'The domain knows the physics and nothing of storage, forms or screens.',
  },
  {
    files: ['lib/schemas/**/*.ts'],
    never: ['app', 'components', 'db', 'lib/services', 'lib/auth', 'lib/http', 'lib/mail', 'lib/jobs', 'lib/ops', 'lib/env'],
    packages: [...FRAMEWORK, ...SERVER_ONLY],
    why: 'Schemas are shared by browser and server: no database, no services.',
  },
  {
    files: ['lib/presentation/**/*.ts'],
    never: ['app', 'components', 'db', 'lib/services', 'lib/auth', 'lib/http', 'lib/mail', 'lib/jobs', 'lib/ops', 'lib/env'],
    packages: [...FRAMEWORK, ...SERVER_ONLY],
    why: 'Presentation turns values into words, for screens, sheets and the API alike.',
  },
  {
    files: ['db/**/*.ts'],
    onlyFolders: ['db', 'lib/domain', 'lib/physics', 'lib/env'],
    onlyPackages: ['kysely', 'pg'],
    never: ['app', 'components', 'lib/services', 'lib/schemas', 'lib/auth', 'lib/http', 'lib/mail', 'lib/jobs', 'lib/ops', 'lib/presentation'],
    packages: [...FRAMEWORK, 'zod'],
    why: 'Storage knows the domain and its own client, nothing above it.',
  },
  {
    files: ['lib/services/**/*.ts'],
    never: ['app', 'components', 'lib/auth', 'lib/http', 'lib/ops'],
    packages: [...FRAMEWORK, 'konva'],
    why: 'A use-case runs the same for a form, a route and a job: no request, response, cookie or screen in it.',
  },
  {
    files: ['lib/jobs/**/*.ts', 'lib/mail/**/*.ts', 'lib/env/**/*.ts'],
    never: ['app', 'components', 'lib/services', 'lib/auth', 'lib/http', 'lib/ops'],
    packages: FRAMEWORK,
    why: 'Jobs, mail and configuration are used by services and know nothing of them.',
  },
  {
    files: ['app/**/*.ts', 'app/**/*.tsx'],
    never: ['db', 'lib/ops', 'lib/jobs'],
    packages: ['konva', 'react-konva', 'pg', 'kysely', 'pg-boss'],
    why: 'Pages and routes adapt: they parse, call a service and answer.',
  },
  {
    files: ['components/**/*.ts', 'components/**/*.tsx'],
    never: ['app', 'db', 'lib/services', 'lib/auth', 'lib/http', 'lib/mail', 'lib/jobs', 'lib/ops', 'lib/env'],
    packages: [...SERVER_ONLY, 'next/image'],
    why: 'Components run in the browser; pages hand them data and actions as props.',
  },
  {
    files: ['components/**/*.ts', 'components/**/*.tsx'],
    except: ['components/schematic/canvas/**'],
    never: [],
    packages: ['konva', 'react-konva'],
    why: 'components/schematic/canvas is the only importer of konva; everything else paints the scene model.',
  },
  {
    files: ['components/ui/**/*.ts', 'components/ui/**/*.tsx'],
    never: ['lib/domain/*', 'lib/physics', 'lib/schemas/*', 'components/*'],
    // How a form learns what was wrong has no domain word in it.
    allow: ['components/ui', 'lib/domain/errors', 'lib/schemas/action-result'],
    packages: [],
    why: 'Primitives know no domain words.',
  },
  {
    files: ['migrations/**/*.ts'],
    onlyFolders: [],
    onlyPackages: ['kysely'],
    never: ['app', 'components', 'db', 'lib'],
    packages: [...FRAMEWORK, 'pg', 'zod'],
    why: 'A migration is frozen: it may not change because something it imports did.',
  },
];

/**
 * Who may reach whom. Each rule has a sentence for whoever meets it first.
 * The same file runs in `npm run check` and in tests/architecture.
 */
const packages = 'node_modules';

/** @param {string} name @param {string} comment @param {object} from @param {object} to */
const forbid = (name, comment, from, to) => ({ name, comment, severity: 'error', from, to });

module.exports = {
  forbidden: [
    forbid(
      'no-circle',
      'Two files that need each other are one thought in two places: move what they share.',
      {},
      { circular: true },
    ),
    forbid('no-unresolved', 'This import leads nowhere.', {}, { couldNotResolve: true }),
    forbid(
      'no-test-in-production',
      'Production code never reaches into tests.',
      { path: '^(backend|frontend|shared|dev-idp)/' },
      { path: '^tests/' },
    ),
    forbid(
      'rules-stand-on-the-kernel',
      'A rule takes facts and answers: it reaches only other rules, the policy’s words and the kernel.',
      { path: '^shared/src/domain/' },
      { pathNot: '^shared/src/(domain|kernel)/' },
    ),
    forbid(
      'kernel-stands-alone',
      'The kernel wraps one package a file and knows nothing of Ebbfolk.',
      { path: '^shared/src/kernel/' },
      { pathNot: ['^shared/src/kernel/', packages] },
    ),
    ...[
      ['dayjs', 'time'],
      ['suncalc', 'sun'],
      ['rrule', 'recurrence-dates'],
    ].map(([name, file]) =>
      forbid(
        `one-package-a-kernel-file-${name}`,
        `${name} is spoken to in kernel/${file}.ts alone.`,
        { path: '^shared/', pathNot: `^shared/src/kernel/${file}\\.ts$` },
        { path: `${packages}/${name}/` },
      ),
    ),
    forbid(
      'shared-reaches-little',
      'What is true on both sides needs zod, dayjs, suncalc and rrule, and nothing else from outside.',
      { path: '^shared/' },
      {
        dependencyTypes: ['npm', 'npm-dev', 'core'],
        pathNot: `${packages}/(zod|dayjs|suncalc|rrule)/`,
      },
    ),
    forbid(
      'front-end-alone',
      'The front end speaks to the back end over the wire only.',
      { path: '^frontend/' },
      { path: '^(backend|dev-idp)/' },
    ),
    forbid(
      'back-end-alone',
      'The back end knows neither the front end nor the stand-in provider; the start command only starts them.',
      { path: '^backend/' },
      { path: '^(frontend|dev-idp)/' },
    ),
    forbid(
      'stand-in-alone',
      'The stand-in provider knows neither end.',
      { path: '^dev-idp/' },
      { path: '^(backend|frontend)/' },
    ),
    forbid(
      'neighbours-by-their-door',
      'A feature asks its neighbour through *.reader.ts, shows it through *.presenter.ts, and enqueues through *.job.ts.',
      { path: '^backend/src/features/([^/]+)/' },
      {
        path: '^backend/src/features/',
        pathNot: ['^backend/src/features/$1/', '\\.(reader|presenter|job)\\.ts$'],
      },
    ),
    forbid(
      'readers-read',
      'A reader reaches no feature, not even its own: it turns rows into values.',
      { path: '\\.reader\\.ts$' },
      { path: '^backend/src/features/' },
    ),
    forbid(
      'labels-are-labels',
      'A job’s label names its queue and payload; the work is elsewhere.',
      { path: '\\.job\\.ts$' },
      { pathNot: [`${packages}/zod/`, '^shared/src/kernel/', '^backend/src/platform/jobs/'] },
    ),
    forbid(
      'sql-in-its-place',
      'TypeORM is spoken to in database, repositories and readers.',
      {
        path: '^(backend|shared|frontend|dev-idp)/',
        pathNot: ['^backend/src/database/', '\\.(repository|reader)\\.ts$'],
      },
      { path: `${packages}/typeorm/` },
    ),
    forbid(
      'pg-in-its-place',
      'The driver itself is needed by database, the job queue, the start command and the store of sign-ins.',
      {
        path: '^(backend|shared|frontend|dev-idp)/',
        pathNot: [
          '^backend/src/(database|platform/jobs|launch)/',
          '^backend/src/http/sign-in\\.ts$',
        ],
      },
      { path: `${packages}/(pg|pg-boss|connect-pg-simple)/` },
    ),
    forbid(
      'express-at-the-door',
      'Only the front door knows Express.',
      { path: '^backend/', pathNot: '^backend/src/http/' },
      { path: `${packages}/(express|express-session|helmet|express-rate-limit)/` },
    ),
    forbid(
      'contracts-at-the-door',
      'What crosses the wire is the business of routes, presenters and the front door.',
      { path: '^backend/', pathNot: ['\\.(routes|presenter)\\.ts$', '^backend/src/http/'] },
      { path: '^shared/src/contracts/' },
    ),
    forbid(
      'platform-knows-no-feature',
      'Database, front door and platform serve every feature and know none.',
      { path: '^backend/src/(platform|http|database)/' },
      { path: '^backend/src/(features|seeds)/' },
    ),
    forbid(
      'front-end-features-apart',
      'Features of the front end meet on a page, nowhere else.',
      { path: '^frontend/src/features/([^/]+)/' },
      { path: '^frontend/src/(features|routes)/', pathNot: '^frontend/src/features/$1/' },
    ),
    forbid(
      'components-know-no-business',
      'A component is given what it shows: no api, contract, rule or query.',
      { path: '^frontend/src/components/' },
      {
        path: [
          '^frontend/src/(api|features|routes)/',
          '^shared/src/(contracts|domain|policy)/',
          `${packages}/@tanstack/`,
        ],
      },
    ),
  ],
  options: {
    doNotFollow: { path: packages },
    // Only our own: many a package keeps its code in dist, and would slip through every fence.
    exclude: { path: '^[^/]+/dist/' },
    tsPreCompilationDeps: true,
    tsConfig: { fileName: 'tsconfig.json' },
    enhancedResolveOptions: {
      exportsFields: ['exports'],
      conditionNames: ['import', 'node', 'default', 'types'],
      extensions: ['.ts', '.tsx', '.mjs', '.js', '.json', '.d.ts'],
    },
  },
};

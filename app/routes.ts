import { index, layout, prefix, type RouteConfig, route } from '@react-router/dev/routes';

export default [
  layout('routes/layouts/open.tsx', [
    index('routes/site/home.tsx'),
    route('sign-in', 'routes/auth/sign-in.tsx'),
    route('forgot', 'routes/auth/forgot.tsx'),
    route('reset/:token', 'routes/auth/reset.tsx'),
    route('join/:token', 'routes/auth/join.tsx'),
    route('mailbox', 'routes/site/mailbox.tsx'),
    route('r/:token', 'routes/site/shared-report.tsx'),
  ]),
  route('sign-out', 'routes/auth/sign-out.ts'),
  route('scheme', 'routes/site/scheme.ts'),
  route('healthz', 'routes/site/healthz.ts'),
  route('photos/:id/:size', 'routes/photos/photo.ts'),

  layout('routes/layouts/shop.tsx', [
    route('bench', 'routes/bench/bench.tsx'),
    route('find', 'routes/find/find.tsx'),
    ...prefix('cases', [
      index('routes/cases/list.tsx'),
      route('new', 'routes/cases/new.tsx'),
      route(':number', 'routes/cases/case.tsx', [
        index('routes/cases/overview.tsx'),
        route('complaint', 'routes/cases/complaint.tsx'),
        route('readings', 'routes/cases/readings.tsx'),
        route('trace', 'routes/cases/trace.tsx'),
        route('repair', 'routes/cases/repair.tsx'),
        route('proof', 'routes/cases/proof.tsx'),
        route('charge', 'routes/cases/charge.tsx'),
        route('write-up', 'routes/cases/write-up.tsx'),
        route('history', 'routes/cases/history.tsx'),
      ]),
      route(':number/print', 'routes/cases/print.tsx'),
    ]),
    ...prefix('write-ups', [
      index('routes/write-ups/list.tsx'),
      route(':slug', 'routes/write-ups/write-up.tsx'),
    ]),
    ...prefix('machines', [
      index('routes/machines/list.tsx'),
      route('new', 'routes/machines/new.tsx'),
      route('import', 'routes/machines/import.tsx'),
      route(':id', 'routes/machines/machine.tsx'),
      route(':id/edit', 'routes/machines/edit.tsx'),
      route(':id/circuits/new', 'routes/machines/new-circuit.tsx'),
      route(':id/circuits/:circuitId', 'routes/machines/circuit.tsx'),
    ]),
    ...prefix('reference', [
      index('routes/reference/reference.tsx'),
      route('cautions', 'routes/reference/cautions.tsx'),
      route('glossary', 'routes/reference/glossary.tsx'),
    ]),
    route('people', 'routes/people/people.tsx'),
    route('people/:id', 'routes/people/person.tsx'),
    route('settings', 'routes/settings/settings.tsx'),
    route('settings/catalogue', 'routes/settings/catalogue.tsx'),
  ]),

  ...prefix('resources', [
    route('photos/upload', 'routes/resources/photos-upload.ts'),
    route('photos/:id', 'routes/resources/photo.ts'),
    route('alike', 'routes/resources/alike.ts'),
    route('preview', 'routes/resources/preview.ts'),
  ]),

  ...prefix('api/v1', [
    route('openapi.json', 'routes/api/v1/openapi.ts'),
    route('find', 'routes/api/v1/find.ts'),
    route('cases', 'routes/api/v1/cases.ts'),
    route('cases/import', 'routes/api/v1/cases-import.ts'),
    route('cases/:number', 'routes/api/v1/case.ts'),
    route('cases/:number/alike', 'routes/api/v1/case-alike.ts'),
    route('cases/:number/photos', 'routes/api/v1/case-photos.ts'),
    route('machines', 'routes/api/v1/machines.ts'),
    route('machines/:id', 'routes/api/v1/machine.ts'),
    route('*', 'routes/api/v1/not-found.ts'),
  ]),
  route('*', 'routes/site/not-found.tsx'),
] satisfies RouteConfig;

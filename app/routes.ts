import { index, layout, type RouteConfig, route } from '@react-router/dev/routes'

// One line a page; whoever adds a route adds its line to the group it belongs to.
export default [
  index('routes/_public/front.tsx'),

  layout('routes/_account/layout.tsx', [
    route('sign-in', 'routes/_account/sign-in.tsx'),
    route('sign-up', 'routes/_account/sign-up.tsx'),
    route('forgot', 'routes/_account/forgot.tsx'),
    route('reset', 'routes/_account/reset.tsx'),
    route('sign-out', 'routes/_account/sign-out.tsx'),
  ]),

  layout('routes/_practice/layout.tsx', [
    route('home', 'routes/_practice/home.tsx'),
    route('sites', 'routes/_practice/sites.tsx'),
    route('sites/new', 'routes/_practice/new-site.tsx'),
    route('sites/:siteId', 'routes/_practice/site.tsx'),
    route('sites/:siteId/edit', 'routes/_practice/edit-site.tsx'),
    route('sites/:siteId/sections/new', 'routes/_practice/new-section.tsx'),
    route('sections/:sectionId/links', 'routes/_practice/links.tsx'),
  ]),
  route('sections/:sectionId', 'routes/_practice/section.tsx'),

  route('s/:token', 'routes/s.$token.tsx'),
  route('api/sections/:sectionId/sheet.svg', 'routes/api/sections/sheet-svg.ts'),
  route('api/sections/:sectionId/thumbnail.svg', 'routes/api/sections/thumbnail-svg.ts'),
  route('api/sections/:sectionId/profile.csv', 'routes/api/sections/profile-csv.ts'),
  route('api/sections/:sectionId/section.json', 'routes/api/sections/section-json.ts'),

  route('mailbox', 'routes/mailbox.tsx'),
  route('health', 'routes/health.ts'),
  route('api/auth/*', 'routes/api/auth.ts'),
  route('api/live-ticket', 'routes/api/live-ticket.ts'),
] satisfies RouteConfig

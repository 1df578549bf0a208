/** Every address of the client, once. Views keep their filters in the query string, built by the pages. */
const part = encodeURIComponent;

/** The pages of a library's settings and of the site; without a name comes the first. */
export type SettingsPage = 'members' | 'tokens' | 'allowances' | 'log';
export type SitePage = 'lanes' | 'mail' | 'log';

export const paths = {
  home: () => '/',
  overview: () => '/',
  signIn: (back?: string) =>
    back === undefined || back === '/' ? '/sign-in' : `/sign-in?back=${part(back)}`,
  signUp: () => '/sign-up',
  forgotten: () => '/forgotten-password',
  resetPassword: () => '/reset-password',
  confirmAddress: () => '/confirm-address',
  invitation: () => '/invitation',
  setUp: () => '/set-up',
  account: () => '/account',
  site: () => '/site',
  sitePage: (page: SitePage) => `/site/${page}`,
  search: (text: string) => `/search?q=${part(text)}`,
  libraries: () => '/libraries',
  newLibrary: () => '/new-library',
  library: (slug: string) => `/libraries/${part(slug)}`,
  librarySettings: (slug: string, page?: SettingsPage) =>
    `/libraries/${part(slug)}/settings${page === undefined ? '' : `/${page}`}`,
  registerBuild: (slug: string, source?: string) =>
    `/libraries/${part(slug)}/register${source === undefined ? '' : `?source=${part(source)}`}`,
  build: (id: number) => `/builds/${id}`,
  run: (id: number) => `/runs/${id}`,
  solve: (id: number, view: { against?: number | undefined; back?: string | undefined } = {}) => {
    const search = new URLSearchParams();
    if (view.against !== undefined) search.set('against', String(view.against));
    if (view.back !== undefined) search.set('back', view.back);
    const text = search.toString();
    return text === '' ? `/solves/${id}` : `/solves/${id}?${text}`;
  },
  comparison: (candidate: number, against?: string) =>
    against === undefined
      ? `/runs/${candidate}/comparison`
      : `/runs/${candidate}/comparison?against=${part(against)}`,
  suites: () => '/suites',
  suite: (slug: string, revision?: number) =>
    revision === undefined ? `/suites/${part(slug)}` : `/suites/${part(slug)}?revision=${revision}`,
  suiteCase: (slug: string, caseId: string, revision?: number) =>
    `/suites/${part(slug)}/cases/${part(caseId)}${revision === undefined ? '' : `?revision=${revision}`}`,
  guide: () => '/guide',
  guideChapter: (chapter: string, section?: string) =>
    `/guide/${part(chapter)}${section === undefined ? '' : `#${part(section)}`}`,
} as const;

import { createBrowserRouter, type RouteObject } from 'react-router-dom';
import { LoadingState } from '@/components/states';
import { PageError } from './PageError';
import { Shell } from './Shell';

type Page = () => React.ReactElement;

/** A page in a chunk of its own. */
const page = (path: string, load: () => Promise<Page>): RouteObject => ({
  path,
  lazy: async () => ({ Component: await load() }),
  errorElement: <PageError />,
});

/** While the first page’s chunk is on its way. */
function Opening() {
  return <LoadingState what="Opening Cragline." lines={3} />;
}

export const router = createBrowserRouter([
  {
    path: '/sign-in',
    hydrateFallbackElement: <Opening />,
    lazy: async () => ({ Component: (await import('@/pages/SignInPage')).SignInPage }),
  },
  {
    path: '/invitation',
    hydrateFallbackElement: <Opening />,
    lazy: async () => ({ Component: (await import('@/pages/InvitationPage')).InvitationPage }),
  },
  {
    path: '/',
    element: <Shell />,
    hydrateFallbackElement: <Opening />,
    errorElement: <PageError />,
    children: [
      page('', async () => (await import('@/pages/StudiesPage')).StudiesPage),
      page('studies/new', async () => (await import('@/pages/NewStudyPage')).NewStudyPage),
      page('studies/:studyId', async () => (await import('@/pages/StudyPage')).StudyPage),
      page('studies/:studyId/brief', async () => (await import('@/pages/BriefPage')).BriefPage),
      page('studies/:studyId/matrix', async () => (await import('@/pages/MatrixPage')).MatrixPage),
      page('studies/:studyId/bench', async () => (await import('@/pages/BenchPage')).BenchPage),
      page('studies/:studyId/bench/:runId', async () => (await import('@/pages/RunPage')).RunPage),
      page('studies/:studyId/fit', async () => (await import('@/pages/FitPage')).FitPage),
      page('studies/:studyId/map', async () => (await import('@/pages/MapPage')).MapPage),
      page(
        'studies/:studyId/release',
        async () => (await import('@/pages/ReleasePage')).ReleasePage,
      ),
      page(
        'studies/:studyId/history',
        async () => (await import('@/pages/HistoryPage')).HistoryPage,
      ),
      page('samples', async () => (await import('@/pages/SamplesPage')).SamplesPage),
      page('samples/new', async () => (await import('@/pages/NewSamplePage')).NewSamplePage),
      page('samples/:sampleId', async () => (await import('@/pages/SamplePage')).SamplePage),
      page('my-samples', async () => (await import('@/pages/MySamplesPage')).MySamplesPage),
      page('lab', async () => (await import('@/pages/LabPage')).LabPage),
      page('*', async () => (await import('@/pages/NotFoundPage')).NotFoundPage),
    ],
  },
]);

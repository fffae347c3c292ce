import { useInfiniteQuery, useQuery } from '@tanstack/react-query';
import { LedgerBar } from '@/components/LedgerBar';
import { Panel } from '@/components/Panel';
import { PracticeTag } from '@/components/PracticeTag';
import { StageLine } from '@/components/StageLine';
import { Lately } from '@/features/studies/Lately';
import { stationsOf } from '@/features/studies/stations';
import { WhatNext } from '@/features/studies/WhatNext';
import { useTitle } from '@/hooks/useTitle';
import { formatDay, formatMass } from '@/lib/format';
import { releaseQueries } from '@/queries/releases';
import { runQueries } from '@/queries/runs';
import { studyQueries } from '@/queries/studies';
import type { StudyJson } from '@shared/schemas/study';
import { WithStudy } from './WithStudy';

function Home({ study }: { readonly study: StudyJson }) {
  useTitle(study.code);
  const hasRuns = study.matrix !== null;
  const { data: runs = [] } = useQuery({ ...runQueries.ofStudy(study.id), enabled: hasRuns });
  const { data: candidates = [] } = useQuery(releaseQueries.candidates(study.id));
  const { data: trail } = useInfiniteQuery(studyQueries.history(study.id));
  const events = trail?.pages[0] ?? [];
  const { usedG, lostG, returnedG, reservedG, leftG, receivedG } = study.stock;
  return (
    <main>
      <div className="head">
        <div className="col-span-full flex flex-wrap gap-6 items-start">
          <div className="flex-1 min-w-0">
            <h1>
              <span className="text-6">{study.title}</span>
            </h1>
            <div className="sub">
              {study.code} · {study.customer ? `for ${study.customer.name} · ` : ''}
              {study.sample.code} {study.sample.name} · opened {formatDay(study.createdAt)} by{' '}
              {study.openedBy.name} {study.isSimulated && <PracticeTag />}
            </div>
          </div>
          {study.question !== '' && <blockquote className="quote">“{study.question}”</blockquote>}
        </div>
        <div className="col-span-full">
          <StageLine stations={stationsOf(study)} isBig />
        </div>
      </div>
      <div className="page desk:grid-cols-[minmax(0,1.85fr)_minmax(0,1fr)]">
        <WhatNext study={study} runs={runs} candidates={candidates} />
        <div className="grid gap-4">
          <Panel name="Sample budget" fact={`${formatMass(receivedG)} received`}>
            <LedgerBar
              usedG={usedG}
              lostG={lostG + returnedG}
              reservedG={reservedG}
              leftG={leftG}
            />
          </Panel>
          <Lately studyId={study.id} events={events} />
        </div>
      </div>
    </main>
  );
}

export function StudyPage() {
  return <WithStudy>{(study) => <Home study={study} />}</WithStudy>;
}

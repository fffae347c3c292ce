import { useTheme } from '@/hooks/useTheme';
import { AppBar } from '../AppBar';
import { Button } from '../Button';
import { PageHeader } from '../PageHeader';
import { PersonMenu } from '../PersonMenu';
import { PracticeTag } from '../PracticeTag';
import { StageLine, type StageStop } from '../StageLine';
import { ThemeSwitch } from '../ThemeSwitch';
import { ActionParts } from './ActionParts';
import { BenchParts } from './BenchParts';
import { ChartParts } from './ChartParts';
import { FormParts } from './FormParts';
import { MapParts } from './MapParts';
import { NumberParts } from './NumberParts';
import { StateParts } from './StateParts';

const STAGES: readonly StageStop[] = [
  { name: 'Brief', state: 'walked', fact: '3 factors, 3 goals', to: '/' },
  { name: 'Matrix', state: 'walked', fact: '21 runs, frozen 4 March' },
  { name: 'Bench', state: 'now', fact: '16 of 21' },
  { name: 'Fit', state: 'ahead' },
  { name: 'Map', state: 'ahead' },
  { name: 'Release', state: 'half', fact: 'block 2' },
];

/** Every part in every state, for looking and comparing. Development only. */
export function Gallery() {
  const { theme, switchTheme } = useTheme();
  return (
    <>
      <AppBar
        home="/"
        crumbs={[{ label: 'Studies', to: '/' }, { label: 'TV-041', to: '/' }, { label: 'Parts' }]}
        tag={<PracticeTag />}
        lab="Tarn Valley Lab"
      >
        <ThemeSwitch theme={theme} onSwitched={switchTheme} />
        <PersonMenu
          name="Ines Hallworth"
          role="Lead"
          items={[{ key: 'out', label: 'Sign out', onChosen: () => undefined }]}
        />
      </AppBar>
      <main>
        <PageHeader
          title="Coarse sand from Quernby granite, little dust"
          facts="TV-041 · feed 45–63 mm, bags of 300 g · Rig 2, envelope rev. 4"
          stages={STAGES.map(({ name, state }) => ({ name, state }))}
          action={<Button variant="primary">Record run 16</Button>}
        />
        <div className="grid gap-4 p-4 sm:p-6 lg:px-8">
          <StageLine stages={STAGES} isLarge />
          <MapParts />
          <ChartParts />
          <FormParts />
          <ActionParts />
          <NumberParts />
          <BenchParts />
          <StateParts />
        </div>
      </main>
    </>
  );
}

import { useState } from 'react';
import { Button } from '../Button';
import { Dialog } from '../Dialog';
import { KeyHint } from '../KeyHint';
import { Menu } from '../Menu';
import { Panel } from '../Panel';
import { PracticeTag } from '../PracticeTag';
import { Tabs } from '../Tabs';
import { TextArea } from '../TextArea';
import { Tooltip } from '../Tooltip';

function Buttons() {
  return (
    <Panel name="Buttons" fact="one primary in view of one decision">
      <div className="grid gap-4">
        <div className="flex flex-wrap items-center gap-2">
          <Button variant="primary">Take as candidate</Button>
          <Button>Look at it on the map</Button>
          <Button variant="stop">Void run 12</Button>
          <Button variant="quiet">Change the question</Button>
          <Button size="small">Try again</Button>
        </div>
        <div className="flex flex-wrap items-center gap-2">
          <Button variant="primary" disabled>
            Freeze 21 runs
          </Button>
          <Button disabled>Recompute</Button>
          <Button variant="stop" disabled>
            Void run 12
          </Button>
          <Button variant="quiet" disabled>
            Copy to report
          </Button>
        </div>
        <div className="grid gap-6 sm:grid-cols-2">
          <Button size="bench">Re-weigh a row</Button>
          <Button size="bench" variant="primary" aria-disabled>
            2 checks to go
          </Button>
        </div>
        <Button size="benchPrimary" variant="primary">
          Close run 16
        </Button>
      </div>
    </Panel>
  );
}

function Layers() {
  const [isOpen, setOpen] = useState(false);
  const [open, setTab] = useState<'terms' | 'anova'>('terms');
  const nothing = () => undefined;
  return (
    <Panel name="Layers and tags">
      <div className="flex flex-wrap items-center gap-3">
        <Button onClick={() => setOpen(true)}>Open a dialog</Button>
        <Menu
          trigger={<Button>Open a menu</Button>}
          items={[
            { key: 'copy', label: 'Copy this study', onChosen: nothing },
            {
              key: 'csv',
              label: 'Export runs',
              note: 'nothing recorded yet',
              onChosen: nothing,
              isDisabled: true,
            },
            { key: 'close', label: 'Close without a card', onChosen: nothing, isStop: true },
          ]}
        />
        <Tooltip text="Spread of the mean over the run-to-run spread.">
          <Button variant="quiet">Hover or focus</Button>
        </Tooltip>
        <PracticeTag />
        <PracticeTag isShort />
        <span>
          <KeyHint>S</KeyHint> swings the section
        </span>
      </div>
      <Dialog
        title="Void run 12?"
        description="Its masses stay on record; the run must be repeated."
        isOpen={isOpen}
        onClosed={() => setOpen(false)}
        action={
          <Button variant="stop" onClick={() => setOpen(false)}>
            Void run 12
          </Button>
        }
      >
        <TextArea label="Reason" />
      </Dialog>
      <div className="mt-4">
        <Tabs
          label="Parts of the fit"
          open={open}
          onOpened={setTab}
          tabs={[
            { key: 'terms', label: 'Terms', content: <p className="p-4">Ten terms.</p> },
            { key: 'anova', label: 'ANOVA', content: <p className="p-4">Five rows.</p> },
          ]}
        />
      </div>
    </Panel>
  );
}

export function ActionParts() {
  return (
    <div className="grid gap-4 lg:grid-cols-2">
      <Buttons />
      <Layers />
    </div>
  );
}

import { fireEvent, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it, vi } from 'vitest';
import { SAMPLE_MAP } from './sampleMap';
import { ContourMap } from '@/charts/map/ContourMap';
import { mapFrame } from '@/charts/map/contourMapOption';
import { fieldOf } from '@/charts/map/field';
import { moveOf } from '@/charts/map/mapKeys';
import { nearestRun } from '@/charts/map/nearestRun';
import { accessibilityProblems } from '@tests/support/accessibility';

function setUp() {
  const handlers = {
    onMoved: vi.fn(),
    onPlaced: vi.fn(),
    onSwung: vi.fn(),
    onTableAsked: vi.fn(),
  };
  const shown = render(
    <ContourMap
      map={SAMPLE_MAP}
      label="Map of passing"
      reading="160 kV, 26 mm: 84.8 %"
      height={400}
      {...handlers}
    />,
  );
  return { ...handlers, ...shown };
}

describe('ContourMap', () => {
  it('takes the keys of the map and nothing else', async () => {
    const { onMoved, onSwung, onTableAsked } = setUp();
    screen.getByRole('application', { name: /^Map of passing/ }).focus();
    await userEvent.keyboard('{ArrowRight}{Shift>}{ArrowDown}{/Shift}{PageUp}st{Enter}x');
    expect(onMoved.mock.calls.map(([move]) => move as unknown)).toEqual([
      { dx: 1, dy: 0, dz: 0 },
      { dx: 0, dy: -5, dz: 0 },
      { dx: 0, dy: 0, dz: 1 },
    ]);
    expect(onSwung).toHaveBeenCalledOnce();
    expect(onTableAsked).toHaveBeenCalledOnce();
    expect(moveOf('Enter', false)).toBeNull();
  });

  it('sets by tap, in the units of its axes', () => {
    const { onPlaced } = setUp();
    const map = screen.getByRole('application');
    map.setPointerCapture = vi.fn();
    map.getBoundingClientRect = () => new DOMRect(0, 0, 800, 400);
    const [clientX, clientY] = mapFrame(SAMPLE_MAP, { width: 800, height: 400 }).at(22, 150);
    fireEvent.pointerDown(map, { clientX, clientY, button: 0 });
    const [placed] = onPlaced.mock.calls[0] as [{ x: number; y: number }];
    expect(placed.x).toBeCloseTo(22, 6);
    expect(placed.y).toBeCloseTo(150, 6);
  });

  it('reads its numbers out, politely', async () => {
    const { container } = setUp();
    expect(screen.getByText('160 kV, 26 mm: 84.8 %')).toHaveAttribute('aria-live', 'polite');
    expect(await accessibilityProblems(container)).toEqual([]);
  });

  it('finds the ring under the pointer, also in a rosette', () => {
    const frame = mapFrame(SAMPLE_MAP, { width: 800, height: 400 });
    const [x, y] = frame.at(25, 155);
    expect(nearestRun(SAMPLE_MAP.runs, frame, [x, y - 15])?.id).toBe(2);
    expect(nearestRun(SAMPLE_MAP.runs, frame, frame.at(30, 150))).toBeNull();
  });

  it('chooses its bands on what can be set', () => {
    const { bands } = fieldOf(SAMPLE_MAP);
    expect(bands.limits).toEqual([70, 72.5, 75, 77.5, 80, 82.5, 85, 87.5]);
  });
});

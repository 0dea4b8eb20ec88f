import { type KeyboardEvent, type PointerEvent, useRef } from 'react';
import type { FitComponent } from '#src/chem/spectra/fit/fit-steps.ts';
import { formatNumber } from '#src/components/notation/quantity.ts';
import type { PlotArea } from '../plot/types.ts';
import { draggedTo, keyed, type Parts, pixelsOf, placeAt } from './drag.ts';

interface FitHandlesProps {
  area: PlotArea;
  components: readonly FitComponent[];
  range: { from: number; to: number };
  /** While it is dragged; nothing is made of it yet. */
  onPreview: (component: number, parts: Parts) => void;
  onSet: (component: number, parts: Parts, byKey: boolean) => void;
  onRange: (range: { from: number; to: number }, byKey: boolean) => void;
}

/** Ends of the range and, on each component, its top and its two sides at half height: for pointer and keyboard. */
export function FitHandles({ area, components, range, onPreview, onSet, onRange }: FitHandlesProps) {
  const box = useRef<HTMLDivElement>(null);
  const placeOf = (event: PointerEvent) => {
    const { left, top } = box.current!.getBoundingClientRect();
    return placeAt(area, event.clientX - left, event.clientY - top);
  };
  const rangeKey = (event: KeyboardEvent, end: 'from' | 'to') => {
    const by = { ArrowRight: 1, ArrowLeft: -1 }[event.key];
    if (!by) return;
    event.preventDefault();
    onRange(ordered({ ...range, [end]: Math.round(range[end] + by * (event.shiftKey ? 1000 : 100)) }), true);
  };
  const shade = (from: number, to: number) => {
    const [a, b] = [from, to].map((v) => Math.min(area.width, Math.max(0, pixelsOf(area, v, 0).left))) as [
      number,
      number,
    ];
    return (
      <div
        className="pointer-events-none absolute inset-y-0 bg-porcelain opacity-70"
        style={{ left: a, width: Math.max(0, b - a) }}
      />
    );
  };
  return (
    <div
      ref={box}
      className="pointer-events-none absolute"
      style={{ left: area.left, top: area.top, width: area.width, height: area.height }}
    >
      {shade(area.x[0], range.from)}
      {shade(range.to, area.x[1])}
      {(['from', 'to'] as const).map((end) => (
        <Handle
          key={end}
          look="edge"
          name={end === 'from' ? 'Lower end of the range' : 'Upper end of the range'}
          now={range[end]}
          text={`${formatNumber(Math.round(range[end]), 5)} per centimetre`}
          at={{ left: pixelsOf(area, range[end], 0).left, top: area.height / 2 }}
          area={area}
          onKey={(event) => rangeKey(event, end)}
          onDrop={(event) => onRange(ordered({ ...range, [end]: Math.round(placeOf(event).wavenumber) }), false)}
        />
      ))}
      {components.map((component, i) => {
        const { wavenumber, height, fwhm } = component;
        const key = (event: KeyboardEvent, handle: 'top' | 'side') => {
          const parts = keyed(component, handle, event, area);
          if (!parts) return;
          event.preventDefault();
          if (Object.keys(parts).length > 0) onSet(i, parts, true);
        };
        const dragging = (handle: 'top' | 'side') => ({
          area,
          onKey: (event: KeyboardEvent) => key(event, handle),
          onMove: (event: PointerEvent) => onPreview(i, draggedTo(component, handle, placeOf(event), area)),
          onDrop: (event: PointerEvent) => onSet(i, draggedTo(component, handle, placeOf(event), area), false),
        });
        return [
          <Handle
            key={`${i} top`}
            look="top"
            name={`Component ${i + 1}: position and height`}
            now={wavenumber}
            text={`${formatNumber(Math.round(wavenumber), 5)} per centimetre, height ${formatNumber(height, 3)}`}
            at={pixelsOf(area, wavenumber, height)}
            mark={String(i + 1)}
            {...dragging('top')}
          />,
          ...[-1, 1].map((side) => (
            <Handle
              key={`${i} ${side}`}
              look="side"
              name={`Component ${i + 1}: width, ${side < 0 ? 'lower' : 'upper'} side`}
              now={fwhm}
              text={`${formatNumber(Math.round(fwhm), 5)} per centimetre`}
              at={pixelsOf(area, wavenumber + (side * fwhm) / 2, height / 2)}
              {...dragging('side')}
            />
          )),
        ];
      })}
    </div>
  );
}

const ordered = ({ from, to }: { from: number; to: number }) => (from <= to ? { from, to } : { from: to, to: from });

interface HandleProps {
  look: 'top' | 'side' | 'edge';
  name: string;
  now: number;
  text: string;
  at: { left: number; top: number };
  /** Stands beside it. */
  mark?: string;
  area: PlotArea;
  onKey: (event: KeyboardEvent) => void;
  onMove?: (event: PointerEvent) => void;
  onDrop: (event: PointerEvent) => void;
}

const LOOKS = {
  top: 'size-3 rounded-full border-2 border-zaffre bg-glaze cursor-move',
  side: 'h-3 w-2 rounded-sm border border-zaffre bg-glaze cursor-ew-resize',
  edge: 'h-7 w-1.5 rounded-sm bg-zaffre cursor-ew-resize',
};

/** 24 px to take hold of, however small it is drawn. */
function Handle({ look, name, now, text, at, mark, area, onKey, onMove, onDrop }: HandleProps) {
  const isHeld = useRef(false);
  if (at.left < -1 || at.left > area.width + 1 || !Number.isFinite(at.top)) return null;
  return (
    <div
      role="slider"
      tabIndex={0}
      aria-label={name}
      aria-valuemin={0}
      aria-valuemax={1e6}
      aria-valuenow={Math.round(now)}
      aria-valuetext={text}
      onKeyDown={onKey}
      onPointerDown={(event) => {
        event.preventDefault();
        event.currentTarget.focus();
        event.currentTarget.setPointerCapture(event.pointerId);
        isHeld.current = true;
      }}
      onPointerMove={(event) => isHeld.current && onMove?.(event)}
      onPointerUp={(event) => {
        if (!isHeld.current) return;
        isHeld.current = false;
        onDrop(event);
      }}
      onPointerCancel={() => {
        isHeld.current = false;
      }}
      className="pointer-events-auto absolute grid size-6 -translate-x-1/2 -translate-y-1/2 touch-none place-items-center rounded"
      style={{ left: at.left, top: Math.min(area.height, Math.max(0, at.top)) }}
    >
      <span className={LOOKS[look]} />
      {mark && (
        <span aria-hidden="true" className="num absolute -top-3.5 text-xs text-zaffre">
          {mark}
        </span>
      )}
    </div>
  );
}

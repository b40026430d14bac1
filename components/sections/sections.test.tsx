import { render, screen, within } from '@testing-library/react';
import { expect, it } from 'vitest';
import { SectionEffect } from '@/components/sections/section-effect';
import { SectionFacts } from '@/components/sections/section-facts';
import { SectionPicture } from '@/components/sections/section-picture';
import { sectionOutline } from '@/lib/library/section-outline';

// EN 10365: IPE 300 and IPE 330
const ipe300 = { section: 'IPE 300', A_m2: 53.8e-4, I_m4: 8356e-8, W_m3: 557e-6, mass_kg_m: 42.2 };
const ipe330 = { section: 'IPE 330', A_m2: 62.6e-4, I_m4: 11770e-8, W_m3: 713e-6, mass_kg_m: 49.1 };

it('says what a change of section touches, before → after and in per cent, and what is carried over', () => {
  render(
    <SectionEffect
      letter="A"
      units="metric"
      preview={{
        to: 'IPE 330',
        from: [{ before: ipe300, after: ipe330, members: 2 }],
        touched: [{ number: 1, frame: 'F1' }],
        frames: 1,
        count: 2,
        carriedOver: 239,
        members: [{ frame: 'F1', number: 1, member: 'BC', role: 'rafter', length_m: 6, before: ipe300, after: ipe330 }],
        mass: { before_kg: 506.4, after_kg: 589.2 },
      }}
    />,
  );
  expect(screen.getByRole('status').textContent).toContain('2 members in 1 frame change to IPE 330; that frame runs again.');
  expect(screen.getByRole('status').textContent).toContain('239 other frames keep their results, carried over from A.');
  const table = screen.getByRole('table', { name: 'IPE 300 becomes IPE 330' });
  expect(within(table).getByRole('row', { name: /^I cm⁴/ }).textContent).toContain('+40.9 %');
  expect(within(table).getByRole('row', { name: /^mass/ }).textContent).toContain('+16.4 %');
});

it('says “not available” for a property without a value', () => {
  const property = { key: 'Iw', what: 'warping constant', symbol: 'I w', value: null, unit: 'cm⁶', source: 'derived' };
  render(<SectionFacts name="S24X121" properties={[property]} />);
  expect(screen.getByRole('row', { name: /warping constant/ }).textContent).toContain('not available');
  expect(screen.queryByText('derived')).toBeNull();
});

it('names a picture by its section and its size', () => {
  const outline = sectionOutline({ shape: 'I', h: 300, b: 150, tw: 7.1, tf: 10.7, r: 15 });
  render(<SectionPicture outline={outline} name="IPE 300" depth="300 mm" width="150 mm" />);
  expect(screen.getByRole('img', { name: 'IPE 300 to scale: depth 300 mm, width 150 mm' })).toBeDefined();
});

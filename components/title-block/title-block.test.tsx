import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { FrameWalk } from '../sheet-index/frame-walk';
import { SheetIndex } from '../sheet-index/sheet-index';
import { TitleBlock } from './title-block';

const push = vi.fn();
vi.mock('next/navigation', () => ({ useRouter: () => ({ push }) }));
beforeEach(() => push.mockClear());

describe('the title block', () => {
  it('says what is not yet, and shows the hash short', () => {
    render(
      <TitleBlock
        project={{ name: '2614 depots' }}
        batch={{ name: 'Portal sheds' }}
        revision={{ letter: 'C', date: '30 Nov' }}
        state="to check"
        prepared="M. Ostrane, 30 Nov"
        checked={null}
        issued={null}
        inputHash="7c1e90ab4421"
        sheet="1 of 7"
      />,
    );
    const block = screen.getByRole('group', { name: 'Title block' });
    expect(block).toHaveTextContent('Checkednot yet');
    expect(block).toHaveTextContent('7c1e 90ab');
    expect(screen.getByRole('img', { name: 'revision C' })).toBeInTheDocument();
  });

  it('carries a frame’s verdict by word and by a ratio that keeps its side of 1.00', () => {
    render(
      <TitleBlock
        project={{ name: 'p' }}
        batch={null}
        revision={null}
        state={null}
        frame={{ id: 'D05-10', number: 90, of: 1240 }}
        verdict={{ verdict: 'over', ratio: 1.003, nearLimit: 0.9 }}
        prepared={null}
        checked={null}
        issued={null}
        inputHash={null}
      />,
    );
    expect(screen.getByRole('group')).toHaveTextContent('over 1.01');
    expect(screen.getByRole('group')).toHaveTextContent('D05-10 90 of 1,240');
  });
});

describe('numbered sheets and the walk through frames', () => {
  it('go to a sheet by its number, but not while something is typed', async () => {
    const user = userEvent.setup();
    render(
      <>
        <SheetIndex
          sheets={[
            { label: 'Glance', href: '/glance', current: true },
            { label: 'Frames', href: '/frames', count: 1240 },
            { label: 'Compare', href: null },
          ]}
        />
        <input aria-label="search" />
      </>,
    );
    expect(screen.getByRole('link', { name: /Glance/ })).toHaveAttribute('aria-current', 'page');
    await user.keyboard('2');
    expect(push).toHaveBeenCalledWith('/frames');
    await user.keyboard('3');
    await user.type(screen.getByLabelText('search'), '1');
    expect(push).toHaveBeenCalledOnce();
  });

  it('go to the next and previous frame by j and k', async () => {
    const user = userEvent.setup();
    render(<FrameWalk here="/frames/90" previous={null} next={{ id: 'D05-15', href: '/frames/95' }} list="in 19 frames over" />);
    await user.keyboard('kj');
    expect(push.mock.calls).toEqual([['/frames/95']]);
    expect(screen.getByText(/first/)).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'Next frame, D05-15' })).toBeInTheDocument();
  });
});

import { act, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { MemoryRouter } from 'react-router-dom';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { CoverPanel } from '@/components/covered/cover-panel';
import { BrimGauge } from '@/components/gauge/brim-gauge';
import { Button } from '@/components/ui/button';
import { charted, signed } from '@/components/ui/data-table';
import { ErrorPanel } from '@/components/ui/error-panel';
import { Figure, figureParts } from '@/components/ui/figure';
import { IdentityStrip } from '@/components/ui/identity-strip';
import { InlinePanel } from '@/components/ui/inline-panel';
import { ThemeSwitch } from '@/components/ui/theme-switch';
import { TopBar } from '@/components/ui/top-bar';

describe('a shut button', () => {
  it('stays reachable, says why, and does nothing', async () => {
    const onClick = vi.fn();
    const onSubmit = vi.fn((event: React.FormEvent) => event.preventDefault());
    render(
      <form onSubmit={onSubmit}>
        <Button type="submit" onClick={onClick} shutReason="The pump shows 440 mL/h.">
          Record start
        </Button>
      </form>,
    );
    const button = screen.getByRole('button', { name: 'Record start' });
    expect(button).toHaveAttribute('aria-disabled', 'true');
    expect(button).toHaveAccessibleDescription('The pump shows 440 mL/h.');
    await userEvent.tab();
    expect(button).toHaveFocus();
    await userEvent.keyboard('{Enter}');
    expect(onClick).not.toHaveBeenCalled();
    expect(onSubmit).not.toHaveBeenCalled();
  });

  it('says what it is doing while it works, and takes no second press', async () => {
    const onClick = vi.fn();
    render(
      <Button busy busyLabel="Signing, please wait" onClick={onClick}>
        Sign
      </Button>,
    );
    await userEvent.click(screen.getByRole('button', { name: 'Signing, please wait' }));
    expect(onClick).not.toHaveBeenCalled();
  });

  it('works when nothing shuts it', async () => {
    const onClick = vi.fn();
    render(<Button onClick={onClick}>Keep as a draft</Button>);
    await userEvent.click(screen.getByRole('button', { name: 'Keep as a draft' }));
    expect(onClick).toHaveBeenCalledOnce();
  });
});

describe('a figure', () => {
  it.each([
    ['52.1', '52', '1'],
    ['44.0', '44', ''],
    ['44', '44', ''],
    ['0.06', '0', '06'],
    ['1.50', '1', '5'],
    ['-3.2', '−3', '2'],
    ['100', '100', ''],
  ])('%s is printed as %s and %s', (value, whole, decimals) => {
    expect(figureParts(value)).toEqual({ whole, decimals });
  });

  it('sets the decimals smaller', () => {
    const { container } = render(<Figure value="52.1" unit="mL/h" />);
    expect(container.querySelector('small')).toHaveTextContent('.1');
    expect(container).toHaveTextContent('52.1mL/h');
  });

  it('says when it is not current', () => {
    render(<Figure value="31.1" unit="mL/h" stale />);
    expect(screen.getByText('not current')).toBeInTheDocument();
  });
});

describe('the brim gauge', () => {
  it('says the whole thing in a sentence', () => {
    render(
      <BrimGauge
        orderMl={1056}
        brimMl={2000}
        brimNote="in 24 h"
        heightPx={360}
        bands={[]}
        ghosts={[]}
        heading="You"
      />,
    );
    expect(screen.getByRole('img')).toHaveAccessibleName(
      'You. Brim gauge: the order gives 1056 mL in 24 h. The brim is 2000 mL in 24 h.',
    );
  });
});

describe('the identity strip', () => {
  const child = {
    name: { surname: 'Hartnoll', given: 'Edie' },
    born: '14 Mar 2022',
    age: '4 y',
    hospitalNumber: 'SM 418 207',
    sex: 'Female',
    allergies: 'None known',
    flags: [],
  };

  it('says Covered where the weight would be', () => {
    render(<IdentityStrip {...child} weight="covered" />);
    expect(screen.getByText('Weight').nextElementSibling).toHaveTextContent(/^Covered$/);
  });

  it('says so when no weight was measured', () => {
    render(<IdentityStrip {...child} weight={null} />);
    expect(screen.getByText('Weight').nextElementSibling).toHaveTextContent('Not measured');
  });
});

describe('the cover', () => {
  afterEach(() => vi.useRealTimers());

  it('holds nothing of the other set and names nobody until it lifts', () => {
    vi.useFakeTimers();
    const rows = [{ label: 'Rate', tall: true }];
    const { rerender } = render(<CoverPanel rows={rows}>44 mL/h</CoverPanel>);
    expect(screen.queryByText('44 mL/h')).not.toBeInTheDocument();
    expect(screen.getByRole('heading', { name: 'The other figures' })).toBeInTheDocument();
    rerender(
      <CoverPanel rows={rows} isLifted>
        44 mL/h
      </CoverPanel>,
    );
    expect(screen.getByText('44 mL/h')).toBeInTheDocument();
    act(() => void vi.advanceTimersByTime(300));
    expect(screen.queryByText(/Covered until/)).not.toBeInTheDocument();
  });
});

function Signing() {
  const [isOpen, setIsOpen] = useState(false);
  return (
    <>
      <button type="button" onClick={() => setIsOpen(true)}>
        Sign
      </button>
      {isOpen && (
        <InlinePanel title="Sign this order" onClose={() => setIsOpen(false)}>
          <input aria-label="Password" />
        </InlinePanel>
      )}
    </>
  );
}

describe('the inline panel', () => {
  it('takes the focus, closes on Escape and gives the focus back', async () => {
    render(<Signing />);
    await userEvent.click(screen.getByRole('button', { name: 'Sign' }));
    expect(screen.getByRole('region', { name: 'Sign this order' })).toBeInTheDocument();
    expect(screen.getByRole('heading', { name: 'Sign this order' })).toHaveFocus();
    await userEvent.tab();
    expect(screen.getByLabelText('Password')).toHaveFocus();
    await userEvent.keyboard('{Escape}');
    expect(screen.queryByRole('region')).not.toBeInTheDocument();
    expect(screen.getByRole('button', { name: 'Sign' })).toHaveFocus();
  });
});

describe('an error', () => {
  it('takes the focus', () => {
    render(<ErrorPanel title="The order was not signed">Nothing was sent.</ErrorPanel>);
    expect(screen.getByRole('heading', { name: 'The order was not signed' })).toHaveFocus();
  });
});

describe('the menu of a phone', () => {
  it('opens, and closes on Escape', async () => {
    render(
      <MemoryRouter>
        <TopBar>
          <a href="#ward">Heron ward</a>
        </TopBar>
      </MemoryRouter>,
    );
    const menu = screen.getByRole('button', { name: 'Menu' });
    await userEvent.click(menu);
    expect(menu).toHaveAttribute('aria-expanded', 'true');
    await userEvent.keyboard('{Escape}');
    expect(menu).toHaveAttribute('aria-expanded', 'false');
  });
});

describe('the theme switch', () => {
  it('keeps the choice and tells the page', async () => {
    const heard = vi.fn();
    window.addEventListener('brimline-theme', heard);
    render(<ThemeSwitch />);
    await userEvent.click(screen.getByRole('radio', { name: 'Night' }));
    expect(localStorage.getItem('brimline-theme')).toBe('night');
    expect(heard).toHaveBeenCalledOnce();
    window.removeEventListener('brimline-theme', heard);
  });
});

describe('charted amounts', () => {
  it.each([
    ['534', '+534'],
    ['-3', '−3'],
    ['0', '0'],
    ['4.2', '+4.2'],
  ])('%s carries its sign: %s', (text, printed) => {
    expect(signed(text)).toBe(printed);
  });

  it('tells nothing charted from zero', () => {
    expect([charted(null), charted('0')]).toEqual(['·', '0']);
  });
});

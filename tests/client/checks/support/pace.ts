import { configure, fireEvent, screen } from '@testing-library/react';
import { vi } from 'vitest';

/** Whole pages on a busy machine: looked through without their styles, and waited for longer. */
configure({ defaultHidden: true, asyncUtilTimeout: 8_000 });
vi.setConfig({ testTimeout: 30_000 });

/** An entry set in one go, where its single keys and its leaving are not what a test is about. */
export const put = (label: string | RegExp, value: string): void => {
  fireEvent.change(screen.getByLabelText(label), { target: { value } });
};

import { render } from '@testing-library/react';
import { StrictMode } from 'react';
import { expect, it, vi } from 'vitest';
import { useSkyMap } from './use-sky-map.ts';

vi.stubGlobal(
  'ResizeObserver',
  class {
    observe() {}
    unobserve() {}
    disconnect() {}
  },
);

function Panel() {
  const { target } = useSkyMap();
  return <div ref={target} />;
}

it('leaves one viewport under strict mode and none after it is gone', () => {
  const { container, unmount } = render(
    <StrictMode>
      <Panel />
    </StrictMode>,
  );
  expect(container.querySelectorAll('.ol-viewport')).toHaveLength(1);
  unmount();
  expect(document.querySelectorAll('.ol-viewport')).toHaveLength(0);
});

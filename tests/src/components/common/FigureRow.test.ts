import { fireEvent, render, screen } from '@testing-library/vue';
import { describe, expect, it } from 'vitest';
import FigureRow from 'src/components/common/FigureRow.vue';

describe('FigureRow', () => {
  it('opens to its arithmetic and says whether it is open', async () => {
    render(FigureRow, {
      props: { label: 'Potassium nitrate', value: '2.41', steps: ['600 g of 23 650 g, of 95.00'] },
    });
    const row = screen.getByRole('button', { name: /Potassium nitrate/ });
    expect(row.getAttribute('aria-expanded')).toBe('false');
    await fireEvent.click(row);
    expect(row.getAttribute('aria-expanded')).toBe('true');
    expect(screen.getByText('600 g of 23 650 g, of 95.00')).toBeTruthy();
  });

  it('is no button when there is nothing to open', () => {
    render(FigureRow, { props: { label: 'Freight', value: '1.05' } });
    expect(screen.queryByRole('button')).toBeNull();
  });
});

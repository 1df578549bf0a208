import type { OrderEstimate } from '../../shared/schemas/solve.ts';
import { formatOrder } from './format.ts';

/** An order as it stands in a column: a figure, or why there is none. */
export function orderWords(order: OrderEstimate | null): string {
  if (order === null) return '–';
  if (order.status === 'estimated' || order.status === 'linear') return formatOrder(order.value);
  if (order.status === 'one ratio')
    return order.value === null ? 'too few steps' : `about ${order.value.toFixed(1)}`;
  if (order.status === 'not enough steps') return 'too few steps';
  if (order.status === 'no root to measure against') return '–';
  if (order.status === 'cycle' && order.period !== null) return `cycle of ${order.period}`;
  if (order.status === 'superlinear, order not resolved') return 'above 1';
  if (order.status === 'superlinear of order 1') return 'just above 1';
  if (order.status === 'sublinear or very slow linear') return 'very slow';
  return order.status;
}

/** Whether the words of an order are a figure, so that they are set in Mono. */
export function isOrderFigure(order: OrderEstimate | null): boolean {
  return (
    order !== null && (order.status === 'estimated' || order.status === 'linear') && order.value !== null
  );
}

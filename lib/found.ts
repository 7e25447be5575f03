import { notFound } from 'next/navigation';
import { NotAllowedError, NotFoundError } from './errors';

/**
 * For pages: what a query answers, or the not-found page when it is missing or not the viewer's to see. The two look the
 * same, so that a guessed address tells nothing.
 */
export async function found<Value>(query: Promise<Value>): Promise<Value> {
  try {
    return await query;
  } catch (error) {
    if (error instanceof NotFoundError || error instanceof NotAllowedError) notFound();
    throw error;
  }
}

import { endpoint } from './endpoint.ts';
import type * as schema from './feedback-schema.ts';

export type { Feedback, FeedbackEdit, GivenFeedback } from './feedback-schema.ts';

export const getFeedback = endpoint<typeof schema.getFeedbackSchema>('GET', '/api/orders/:token/feedback', 'public');
export const giveFeedback = endpoint<typeof schema.giveFeedbackSchema>('PUT', '/api/orders/:token/feedback', 'public');
export const listFeedback = endpoint<typeof schema.listFeedbackSchema>('GET', '/api/office/feedback', ['owner']);

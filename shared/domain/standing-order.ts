/** Weeks between the boxes of a standing order. */
export const STANDING_WEEKS = [4, 6, 8, 12] as const;

/** `pending` until its first order is paid and its card kept. */
export const STANDING_STATES = ['pending', 'active', 'paused', 'ended'] as const;

/** One box of a standing order: kept and waiting for its charge, paid, skipped, or refused by the card. */
export const TURN_STATES = ['planned', 'paid', 'skipped', 'failed'] as const;

/** Shown to the owner beside the terms: what they say is the farm's to answer for. */
export const STANDING_CAUTION =
  'The law on subscription contracts is changing (Digital Markets, Competition and Consumers Act 2024, part 4, chapter 2): reminders, cooling-off and ways out may be prescribed. Check the commencement dates, and ask your trading standards service, before you offer standing orders.';

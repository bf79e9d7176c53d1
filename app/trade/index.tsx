import { Redirect } from 'expo-router';

/** What is coming stands first. */
export default function TradeStart() {
  return <Redirect href="/trade/carcases" />;
}

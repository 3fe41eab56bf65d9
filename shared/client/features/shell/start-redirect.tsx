/** The bare address leads to the home of the signed-in person; the gate there asks for sign-in if needed. */
import { Redirect } from 'expo-router';

export function StartRedirect() {
  return <Redirect href="/home" />;
}

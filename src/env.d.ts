declare namespace App {
  interface Locals {
    /** Who asks; null when nobody is signed in. */
    user: import('@/features/account/account').User | null;
    /** The person's choice; null follows the device. */
    theme: import('@/http/theme').Theme | null;
  }
}

declare namespace App {
  interface Locals {
    /** Where the product is reached: its scheme and host, as configured. */
    origin: string;
    /** Who asks; null when nobody is signed in. */
    user: import('@/features/account/account').User | null;
    /** What a page threw, for the page that says so; null while all is well. */
    refusal: import('@/lib/app-error').AppError | null;
    /** The person's choice; null follows the device. */
    theme: import('@/http/theme').Theme | null;
  }
}

/**
 * Digits behind the point of each currency's minor unit, by its code. Source: ISO 4217, list one. `Intl` is not asked: its digits differ for
 * 29 of these codes, since it says what is usual in shops and not what the standard says.
 */
const CODES_BY_DIGITS: Readonly<Record<number, string>> = {
  0:
    'BIF CLP DJF GNF ISK JPY KMF KRW PYG RWF UGX UYI VND VUV XAF XAG XAU XBA XBB XBC XBD XDR XOF XPD XPF ' +
    'XPT XSU XTS XUA XXX ',
  2:
    'AED AFN ALL AMD ANG AOA ARS AUD AWG AZN BAM BBD BDT BGN BMD BND BOB BOV BRL BSD BTN BWP BYN BZD CAD ' +
    'CDF CHE CHF CHW CNY COP COU CRC CUC CUP CVE CZK DKK DOP DZD EGP ERN ETB EUR FJD FKP GBP GEL GHS GIP ' +
    'GMD GTQ GYD HKD HNL HTG HUF IDR ILS INR IRR JMD KES KGS KHR KPW KYD KZT LAK LBP LKR LRD LSL MAD MDL ' +
    'MGA MKD MMK MNT MOP MRU MUR MVR MWK MXN MXV MYR MZN NAD NGN NIO NOK NPR NZD PAB PEN PGK PHP PKR PLN ' +
    'QAR RON RSD RUB SAR SBD SCR SDG SEK SGD SHP SLE SOS SRD SSP STN SVC SYP SZL THB TJS TMT TOP TRY TTD ' +
    'TWD TZS UAH USD USN UYU UZS VED VES WST XCD YER ZAR ZMW ZWG ',
  3: 'BHD IQD JOD KWD LYD OMR TND',
  4: 'CLF UYW',
}

const DIGITS = new Map(
  Object.entries(CODES_BY_DIGITS).flatMap(([digits, codes]) =>
    codes
      .trim()
      .split(/\s+/)
      .map((code) => [code, Number(digits)] as const),
  ),
)

/** Every code of the list. */
export const currencyCodes: readonly string[] = [...DIGITS.keys()].sort()

/** How many digits a currency has behind the point; undefined for a code that is not in the standard's list. */
export const minorUnits = (code: string): number | undefined => DIGITS.get(code)

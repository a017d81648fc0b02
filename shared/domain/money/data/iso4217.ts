/**
 * Decimal places of the currencies a club may keep its books in.
 *
 * Source: ISO 4217 list one (currencies in use), as published by SIX for the maintenance agency,
 * read in the machine-readable copy at github.com/datasets/currency-codes (archive/table_a1.xml,
 * published 2017-01-01), with the later amendments from memory: MRU and STN (2018), VES (2018),
 * VED (2021), SLE (2022), ZWG (2024), XCG (2025). Funds, metals and test codes are left out,
 * since nobody pays with them.
 */
export const codesByExponent: Readonly<Record<0 | 2 | 3, string>> = {
  0: 'BIF CLP DJF GNF ISK JPY KMF KRW PYG RWF UGX VND VUV XAF XOF XPF',
  2:
    'AED AFN ALL AMD ANG AOA ARS AUD AWG AZN BAM BBD BDT BGN BMD BND BOB BRL BSD BTN BWP BYN BZD ' +
    'CAD CDF CHF CNY COP CRC CUP CVE CZK DKK DOP DZD EGP ERN ETB EUR FJD FKP GBP GEL GHS GIP GMD ' +
    'GTQ GYD HKD HNL HTG HUF IDR ILS INR IRR JMD KES KGS KHR KPW KYD KZT LAK LBP LKR LRD LSL MAD ' +
    'MDL MGA MKD MMK MNT MOP MRU MUR MVR MWK MXN MYR MZN NAD NGN NIO NOK NPR NZD PAB PEN PGK PHP ' +
    'PKR PLN QAR RON RSD RUB SAR SBD SCR SDG SEK SGD SHP SLE SOS SRD SSP STN SVC SYP SZL THB TJS ' +
    'TMT TOP TRY TTD TWD TZS UAH USD UYU UZS VED VES WST XCD XCG YER ZAR ZMW ZWG',
  3: 'BHD IQD JOD KWD LYD OMR TND',
};

/**
 * Smallest sum that can be paid in coins, in minor units, where that is more than one.
 *
 * Source: the central banks' cash rounding rules, from memory: Switzerland 0.05, Canada 0.05 (since
 * 2013), Australia 0.05, New Zealand 0.10, Sweden, Norway and Czechia 1.00, Denmark 0.50,
 * Hungary 5.00. The euro area rounds in some countries only, so not here.
 */
export const cashSteps: Readonly<Record<string, number>> = {
  AUD: 5,
  CAD: 5,
  CHF: 5,
  CZK: 100,
  DKK: 50,
  HUF: 500,
  NOK: 100,
  NZD: 10,
  SEK: 100,
};

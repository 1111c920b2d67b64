import type { Observation } from "@/lib/reliability/observation";

// Published sets of lives. The figures beside them in the tests are those printed in the source, and for more digits
// those of R 4.2.2 with survival 3.5-3.

type Columns = {
  readonly entry?: readonly number[];
  readonly time: readonly number[];
  readonly event: readonly number[];
  readonly count?: readonly number[];
};

/** Rows from columns of ages, of events (1 failed, 0 not), and of entries and counts where there are any. */
const lives = ({ entry, time, event, count }: Columns): Observation[] =>
  time.map((ageDays, at) => ({
    ageDays,
    failed: event[at] === 1,
    count: count?.[at] ?? 1,
    ...(entry ? { entryDays: entry[at] ?? 0 } : {}),
  }));

/** Acute myelogenous leukaemia, maintained arm: Miller (1981), p. 49 (seen in public R courses). */
export const AML_MAINTAINED: Observation[] = lives({
  time: [9, 13, 13, 18, 23, 28, 31, 34, 45, 48, 161],
  event: [1, 1, 0, 1, 1, 0, 1, 1, 0, 1, 0],
});

/** The other arm of it, which ends at a survival of 0. */
export const AML_NOT_MAINTAINED: Observation[] = lives({
  time: [5, 5, 8, 8, 12, 16, 23, 27, 30, 33, 43, 45],
  event: [1, 1, 1, 1, 1, 0, 1, 1, 1, 1, 1, 1],
});

/** Remissions under 6-MP: Freireich et al. (1963), as in Klein and Moeschberger (2003), table 4.1A (data seen). */
export const REMISSIONS: Observation[] = lives({
  time: [6, 6, 6, 6, 7, 9, 10, 10, 11, 13, 16, 17, 19, 20, 22, 23, 25, 32, 32, 34, 35],
  event: [1, 1, 1, 0, 1, 0, 1, 0, 0, 1, 1, 0, 0, 0, 1, 1, 0, 0, 0, 0, 0],
});

/** 20 units, 6 failures, 4 removed: NIST/SEMATECH e-Handbook 8.2.1.5 (seen). */
export const NIST_8215: Observation[] = lives({
  time: [10, 32, 56, 98, 122, 181, 50, 100, 125, 150, 200, 200, 200, 200, 200, 200, 200, 200, 200, 200],
  event: [1, 1, 1, 1, 1, 1, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0],
});

/** Shock absorbers, km: O'Connor (1985), p. 85; Meeker and Escobar (1998), table C.2 (data seen). */
export const SHOCK_ABSORBERS: Observation[] = lives({
  time: [
    6700, 6950, 7820, 8790, 9120, 9660, 9820, 11310, 11690, 11850, 11880, 12140, 12200, 12870, 13150, 13330,
    13470, 14040, 14300, 17520, 17540, 17890, 18450, 18960, 18980, 19410, 20100, 20100, 20150, 20320, 20900,
    22700, 23490, 26510, 27410, 27490, 27890, 28100,
  ],
  event: [
    1, 0, 0, 0, 1, 0, 0, 0, 0, 0, 0, 0, 1, 0, 1, 0, 0, 0, 1, 1, 0, 0, 0, 0, 0, 0, 1, 0, 0, 0, 1, 1, 0, 1, 0,
    1, 0, 0,
  ],
});

/** Men of Channing House, months: Klein and Moeschberger (2003), example 4.3 (data of R package KMsurv). */
export const CHANNING_MEN: Observation[] = lives({
  entry: [
    782, 1020, 856, 915, 863, 906, 955, 943, 943, 837, 966, 936, 919, 852, 1073, 925, 967, 806, 969, 923, 865,
    953, 871, 982, 883, 817, 875, 821, 936, 971, 830, 885, 894, 893, 866, 878, 820, 1007, 879, 956, 854, 890,
    1041, 978, 836, 938, 886, 876, 955, 823, 960, 843, 856, 847, 1027, 988, 978, 981, 926, 1036, 1016, 969,
    900, 898, 846, 964, 984, 1046, 871, 847, 962, 853, 967, 1063, 856, 865, 1051, 1010, 878, 1021, 959, 921,
    836, 919, 751, 906, 835, 946, 759, 909, 962, 984, 891, 835, 1039, 1010,
  ],
  time: [
    909, 1128, 969, 957, 983, 1012, 1055, 1025, 1043, 945, 1009, 971, 1033, 869, 1139, 1036, 1085, 943, 1001,
    1060, 1002, 1031, 945, 1006, 959, 843, 1012, 956, 1073, 1107, 940, 911, 1031, 996, 895, 1015, 957, 1043,
    1016, 1093, 989, 1027, 1044, 1005, 973, 1064, 1023, 1013, 977, 960, 1047, 943, 951, 984, 1058, 1045, 1018,
    1118, 970, 1070, 1153, 1106, 936, 906, 866, 1029, 1053, 1080, 872, 893, 966, 894, 985, 1094, 927, 948,
    1059, 1012, 911, 1094, 972, 993, 876, 993, 777, 966, 907, 1031, 781, 914, 998, 1022, 932, 898, 1060, 1044,
  ],
  event: [
    1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0,
    0, 0, 0, 0, 0, 1, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 1, 1, 1, 1, 1,
    0, 1, 1, 1, 1, 1, 1, 1, 1, 1, 0, 1, 1, 1, 1, 1, 1, 1, 1, 0, 1, 1, 1, 1, 1, 1,
  ],
});

/** 20 units, test ended at 500 h: NIST/SEMATECH e-Handbook 8.4.1.3 (seen). */
export const NIST_8413: Observation[] = lives({
  time: [54, 187, 216, 240, 244, 335, 361, 373, 375, 386, 500, 500, 500, 500, 500, 500, 500, 500, 500, 500],
  event: [1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0],
});

/** Diesel-generator fans, thousands of hours: Nelson (1982), p. 133 (data seen). */
export const FANS: Observation[] = lives({
  time: [
    0.45, 0.46, 1.15, 1.56, 1.6, 1.66, 1.85, 2.03, 2.07, 2.08, 2.2, 3, 3.1, 3.2, 3.45, 3.75, 4.15, 4.3, 4.6,
    4.85, 5, 6.1, 6.1, 6.3, 6.45, 6.7, 7.45, 7.8, 8.1, 8.2, 8.5, 8.75, 8.75, 9.4, 9.9, 10.1, 11.5,
  ],
  event: [
    1, 0, 1, 0, 1, 0, 0, 0, 1, 1, 0, 0, 1, 0, 1, 0, 0, 0, 1, 0, 0, 0, 1, 0, 0, 0, 0, 0, 0, 0, 0, 0, 1, 0, 0,
    0, 0,
  ],
  count: [
    1, 1, 2, 1, 1, 1, 5, 3, 2, 1, 1, 4, 1, 1, 1, 2, 4, 4, 1, 4, 3, 3, 1, 1, 2, 1, 1, 2, 2, 1, 3, 2, 1, 1, 1,
    3, 1,
  ],
});

/** Bearing cages, hours: Abernethy et al. (1983), AFWAL-TR-83-2079 (data seen). */
export const BEARING_CAGES: Observation[] = lives({
  time: [
    50, 150, 230, 250, 334, 350, 423, 450, 550, 650, 750, 850, 950, 990, 1009, 1050, 1150, 1250, 1350, 1450,
    1510, 1550, 1650, 1850, 2050,
  ],
  event: [0, 0, 1, 0, 1, 0, 1, 0, 0, 0, 0, 0, 0, 1, 1, 0, 0, 0, 0, 0, 1, 0, 0, 0, 0],
  count: [
    288, 148, 1, 124, 1, 111, 1, 106, 99, 110, 114, 119, 127, 1, 1, 123, 93, 47, 41, 27, 1, 11, 6, 1, 2,
  ],
});

/** Ball bearings, million turns: Lieblein and Zelen, in Lawless (2003); the copy with 48.40 (data seen). */
export const BALL_BEARINGS: Observation[] = lives({
  time: [
    17.88, 28.92, 33, 41.52, 42.12, 45.6, 48.4, 51.84, 51.96, 54.12, 55.56, 67.8, 68.64, 68.64, 68.88, 84.12,
    93.12, 98.64, 105.12, 105.84, 127.92, 128.04, 173.4,
  ],
  event: [1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1],
});

/** Heat-exchanger tubes of three start cohorts, years: Meeker and Escobar (1998), 3.6 (data seen). */
export const HEAT_EXCHANGERS: Observation[] = lives({
  time: [1, 2, 3, 3, 1, 2, 2, 1, 1],
  event: [1, 1, 1, 0, 1, 1, 0, 1, 0],
  count: [1, 2, 2, 95, 2, 3, 95, 1, 99],
});

/** The placebo arm beside the remissions under 6-MP (data seen). */
export const PLACEBO: Observation[] = lives({
  time: [1, 22, 3, 12, 8, 17, 2, 11, 8, 12, 2, 5, 4, 15, 8, 23, 5, 11, 4, 1, 8],
  event: [1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1],
});

/** Larynx cancer by stage: Klein and Moeschberger (2003), example 7.2 (data of R package KMsurv). */
export const LARYNX: Observation[][] = [
  lives({
    time: [
      0.6, 1.3, 2.4, 2.5, 3.2, 3.2, 3.3, 3.3, 3.5, 3.5, 4, 4, 4.3, 4.5, 4.5, 5.3, 5.5, 5.9, 5.9, 6, 6.1, 6.2,
      6.4, 6.5, 6.5, 6.7, 7, 7.4, 7.4, 8.1, 8.1, 9.6, 10.7,
    ],
    event: [
      1, 1, 1, 0, 1, 0, 1, 0, 1, 1, 1, 1, 1, 0, 0, 1, 0, 0, 0, 1, 0, 0, 1, 1, 0, 0, 0, 1, 0, 0, 0, 0, 0,
    ],
  }),
  lives({
    time: [0.2, 1.8, 2, 2.2, 2.6, 3.3, 3.6, 3.6, 4, 4.3, 4.3, 5, 6.2, 7, 7.5, 7.6, 9.3],
    event: [1, 1, 1, 0, 0, 0, 1, 0, 1, 0, 0, 0, 1, 1, 0, 0, 0],
  }),
  lives({
    time: [
      0.3, 0.3, 0.5, 0.7, 0.8, 1, 1.3, 1.6, 1.8, 1.9, 1.9, 3.2, 3.5, 3.7, 4.5, 4.8, 4.8, 5, 5, 5.1, 6.3, 6.4,
      6.5, 7.8, 8, 9.3, 10.1,
    ],
    event: [1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 1, 0, 0, 0, 0, 1, 0, 0, 1, 1, 0, 1, 0, 0, 0],
  }),
  lives({
    time: [0.1, 0.3, 0.4, 0.8, 0.8, 1, 1.5, 2, 2.3, 2.9, 3.6, 3.8, 4.3],
    event: [1, 1, 1, 1, 1, 1, 1, 1, 1, 0, 1, 1, 0],
  }),
];

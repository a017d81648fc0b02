import type { CatalogueSalt } from '../catalogueTypes.ts';

/** Every salt of the shipped list with its facts, each with the source it was taken from. */
export const catalogue: readonly CatalogueSalt[] = [
  {
    id: 'KNO3',
    name: 'Potassium nitrate',
    commonNames: ['potassium nitrate', 'saltpetre', 'nitrate of potash', '13.7-0-46'],
    iupacName: {
      value: 'potassium nitrate',
      source: 'memory',
    },
    formula: 'KNO3',
    cas: {
      value: '7757-79-1',
      source: 'published: chemicalbook.in, CAMEO 1370',
    },
    molarMass: {
      value: 101.102,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        K: 0.386718,
        N: 0.138543,
        O: 0.474738,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        NO3: 0.613282,
        N_as_nitrate: 0.138543,
        K2O: 0.465841,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [13.64, 21.36, 31.93, 38.31, 45.56, 62.87],
      anhydrousPer100gTotalWater: [13.64, 21.36, 31.93, 38.31, 45.56, 62.87],
      anhydrousMassPercent: [12.0, 17.6, 24.2, 27.7, 31.3, 38.6],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 1.0,
      high: 1.3,
      source: 'memory',
    },
    appearance: {
      value: 'colourless to white crystals or prills',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'low',
      criticalHumidity: 90.5,
      source:
        'published: critical relative humidity at 30 °C, Wikipedia "Critical relative humidity" (as of 2023-10)',
    },
    ghs: {
      statements: ['H272'],
      signalWord: 'Warning',
      source:
        'published: chemicalbook.in SDS page (H272 Ox. Sol. 3); other SDS add H319 or H302/H319',
    },
    transport: {
      value: 'UN1486, class 5.1, packing group III',
      source: 'published: 49 CFR 172.101 extract on hazmattool.com',
    },
    regulatoryFlags: [
      {
        list: 'reportable',
        value: 'EU Reg. 2019/1148 Annex II (reportable: suspicious transactions, losses, thefts)',
        source: 'published: dutchchems.com/precursors summary of the regulation',
      },
      {
        list: 'reportable',
        value: 'GB Poisons Act 1972 Sch. 1A Part 3 (reportable)',
        source: 'published: Wikipedia page on SI 2023/63 and legislation.gov.uk SI 2023/63 reg. 8',
      },
    ],
    storage: {
      value:
        'Cool, dry, closed; keep apart from paper, wood dust, sugar, oils, solvents, metal powders, acids and any heat source; never in an unlabelled food jar.',
      source: 'memory',
    },
    supplies: ['N', 'K'],
    notes: [
      {
        value: 'Strongly endothermic dissolution: the bottle cools and dissolving slows.',
        source: 'memory',
      },
      {
        value:
          'Only main aquarium salt whose solubility falls steeply in the cold (about 21 g/100 g at 10 °C against 32 at 20 °C).',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'KH2PO4',
    name: 'Monopotassium phosphate',
    commonNames: ['monopotassium phosphate', 'MKP', 'potassium dihydrogen phosphate', '0-52-34'],
    iupacName: {
      value: 'potassium dihydrogen phosphate',
      source: 'memory',
    },
    formula: 'KH2PO4',
    cas: {
      value: '7778-77-0',
      source: 'memory',
    },
    molarMass: {
      value: 136.084,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        H: 0.014814,
        K: 0.287308,
        O: 0.470268,
        P: 0.227609,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        PO4: 0.697878,
        P2O5: 0.521527,
        K2O: 0.346091,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [13.3, 17.52, 22.32, 24.95, 27.83, 33.83],
      anhydrousPer100gTotalWater: [13.3, 17.52, 22.32, 24.95, 27.83, 33.83],
      anhydrousMassPercent: [11.74, 14.91, 18.25, 19.97, 21.77, 25.28],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 1.0,
      high: 1.3,
      source: 'memory',
    },
    appearance: {
      value: 'white or colourless crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'low',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['P', 'K'],
    notes: [
      {
        value: 'Solution is acidic, pH about 4.4 at 1 % (memory).',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'K2HPO4',
    name: 'Dipotassium phosphate',
    commonNames: ['dipotassium phosphate', 'DKP'],
    iupacName: {
      value: 'dipotassium hydrogen phosphate',
      source: 'memory',
    },
    formula: 'K2HPO4',
    cas: {
      value: '7758-11-4',
      source: 'memory',
    },
    molarMass: {
      value: 174.174,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        H: 0.005787,
        K: 0.448953,
        O: 0.367426,
        P: 0.177834,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        PO4: 0.545259,
        P2O5: 0.407475,
        K2O: 0.54081,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [132.56, 144.5, 159.74, 168.1, 178.55, 209.6],
      anhydrousPer100gTotalWater: [132.56, 144.5, 159.74, 168.1, 178.55, 209.6],
      anhydrousMassPercent: [57.0, 59.1, 61.5, 62.7, 64.1, 67.7],
      note: 'stable solid near room temperature is a hydrate (trihydrate); CRC flags a phase change between 30 and 40 °C',
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.9,
      high: 1.2,
      source: 'memory',
    },
    appearance: {
      value: 'white granules or powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'high (deliquescent)',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['P', 'K'],
    notes: [
      {
        value:
          'Alkaline solution, pH about 9 (memory): precipitates Ca, Mg and unchelated trace metals much more readily than KH2PO4.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'K2SO4',
    name: 'Potassium sulfate',
    commonNames: ['potassium sulfate', 'sulphate of potash', 'SOP', '0-0-50'],
    iupacName: {
      value: 'dipotassium sulfate',
      source: 'memory',
    },
    formula: 'K2SO4',
    cas: {
      value: '7778-80-5',
      source: 'memory',
    },
    molarMass: {
      value: 174.252,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        K: 0.448752,
        O: 0.367261,
        S: 0.183986,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        K2O: 0.540568,
        SO4: 0.551248,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [7.65, 9.24, 11.05, 11.98, 12.87, 14.81],
      anhydrousPer100gTotalWater: [7.65, 9.24, 11.05, 11.98, 12.87, 14.81],
      anhydrousMassPercent: [7.11, 8.46, 9.95, 10.7, 11.4, 12.9],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 1.2,
      high: 1.6,
      source: 'memory',
    },
    appearance: {
      value: 'hard white crystals or powder; slow to dissolve',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'very low',
      criticalHumidity: 96.3,
      source:
        'published: critical relative humidity at 30 °C, Wikipedia "Critical relative humidity" (as of 2023-10)',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['K', 'S'],
    notes: [
      {
        value:
          'Least soluble of the K salts used; loses further solubility when another potassium salt shares the bottle (common ion).',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'KCl',
    name: 'Potassium chloride',
    commonNames: ['potassium chloride', 'muriate of potash', 'MOP', '0-0-60'],
    iupacName: {
      value: 'potassium chloride',
      source: 'memory',
    },
    formula: 'KCl',
    cas: {
      value: '7447-40-7',
      source: 'memory',
    },
    molarMass: {
      value: 74.548,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Cl: 0.475533,
        K: 0.524467,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        K2O: 0.631774,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [27.78, 30.91, 34.03, 35.54, 37.06, 40.04],
      anhydrousPer100gTotalWater: [27.78, 30.91, 34.03, 35.54, 37.06, 40.04],
      anhydrousMassPercent: [21.74, 23.61, 25.39, 26.22, 27.04, 28.59],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.93,
      high: 1.04,
      source:
        'published: typical fertiliser bulk densities, studylib.net/doc/18119690 (lb/cu ft, converted) (granular 58-65)',
    },
    appearance: {
      value: 'white crystals; mined grades pink to red from iron oxide',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'moderate',
      criticalHumidity: 84.0,
      source:
        'published: critical relative humidity at 30 °C, Wikipedia "Critical relative humidity" (as of 2023-10)',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['K', 'Cl'],
    notes: [
      {
        value: 'Red fertiliser grade carries iron and clay; buy white.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'KHCO3',
    name: 'Potassium bicarbonate',
    commonNames: ['potassium bicarbonate', 'potassium hydrogen carbonate'],
    iupacName: {
      value: 'potassium hydrogencarbonate',
      source: 'memory',
    },
    formula: 'KHCO3',
    cas: {
      value: '298-14-6',
      source: 'memory',
    },
    molarMass: {
      value: 100.114,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        C: 0.119973,
        H: 0.010069,
        K: 0.390535,
        O: 0.479423,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        K2O: 0.470439,
        alkalinity_meq_per_g: 9.988613,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [22.88, 27.76, 33.19, 36.24, 39.14, 45.6],
      anhydrousPer100gTotalWater: [22.88, 27.76, 33.19, 36.24, 39.14, 45.6],
      anhydrousMassPercent: [18.62, 21.73, 24.92, 26.6, 28.13, 31.32],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.9,
      high: 1.2,
      source: 'memory',
    },
    appearance: {
      value: 'white crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'low',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['K', 'KH'],
    notes: [
      {
        value:
          'Raises KH and adds K; fizzes with acidic salts such as KH2PO4 or acidified trace stock.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'K2CO3',
    name: 'Potassium carbonate',
    commonNames: ['potassium carbonate', 'potash', 'pearl ash'],
    iupacName: {
      value: 'dipotassium carbonate',
      source: 'memory',
    },
    formula: 'K2CO3',
    cas: {
      value: '584-08-7',
      source: 'memory',
    },
    molarMass: {
      value: 138.204,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        C: 0.086908,
        K: 0.565801,
        O: 0.347291,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        K2O: 0.681565,
        alkalinity_meq_per_g: 14.471361,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [105.34, 107.04, 109.64, 111.42, 113.22, 117.39],
      anhydrousPer100gTotalWater: [105.34, 107.04, 109.64, 111.42, 113.22, 117.39],
      anhydrousMassPercent: [51.3, 51.7, 52.3, 52.7, 53.1, 54.0],
      note: 'solid phase is K2CO3.1.5H2O',
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.8,
      high: 1.3,
      source: 'memory',
    },
    appearance: {
      value: 'white powder or granules',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'very high (deliquescent)',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H315', 'H319', 'H335'],
      signalWord: 'Warning',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['K', 'KH'],
    notes: [
      {
        value: 'pH about 11.5 in solution (memory): eye and skin protection; exothermic.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'MgSO4.7H2O',
    name: 'Epsom salt',
    commonNames: ['Epsom salt', 'magnesium sulfate heptahydrate', 'bitter salt'],
    iupacName: {
      value: 'magnesium sulfate heptahydrate',
      source: 'memory',
    },
    formula: 'MgSO4·7H2O',
    cas: {
      value: '10034-99-8',
      source: 'memory',
    },
    molarMass: {
      value: 246.466,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        H: 0.057257,
        Mg: 0.098614,
        O: 0.71405,
        S: 0.130079,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        MgO: 0.163528,
        SO4: 0.389733,
        hardness_meq_per_g: 8.11471,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.511653,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [59.41, 79.97, 105.75, 116.71, 136.66, 172.29],
      anhydrousPer100gTotalWater: [22.25, 27.71, 33.51, 35.69, 39.28, 44.72],
      anhydrousMassPercent: [18.2, 21.7, 25.1, 26.3, 28.2, 30.9],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.85,
      high: 1.1,
      source: 'memory',
    },
    appearance: {
      value: 'colourless needles or crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'loses water (effloresces) in dry warm air; cakes in damp air',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Mg', 'S'],
    notes: [
      {
        value:
          'Partly dried Epsom salt contains more Mg per gram than the label; check for powdery white crust.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'MgSO4',
    name: 'Magnesium sulfate anhydrous',
    commonNames: ['magnesium sulfate anhydrous', 'dried Epsom salt'],
    iupacName: {
      value: 'magnesium sulfate',
      source: 'memory',
    },
    formula: 'MgSO4',
    cas: {
      value: '7487-88-9',
      source: 'published: SDS (manualshelf.com 100060267)',
    },
    molarMass: {
      value: 120.361,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Mg: 0.201934,
        O: 0.5317,
        S: 0.266365,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        MgO: 0.334859,
        SO4: 0.798066,
        hardness_meq_per_g: 16.616678,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [22.25, 27.71, 33.51, 35.69, 39.28, 44.72],
      anhydrousPer100gTotalWater: [22.25, 27.71, 33.51, 35.69, 39.28, 44.72],
      anhydrousMassPercent: [18.2, 21.7, 25.1, 26.3, 28.2, 30.9],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.9,
      high: 1.3,
      source: 'memory',
    },
    appearance: {
      value: 'white powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'very high (drying agent)',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Mg', 'S'],
    notes: [
      {
        value:
          'Heats up strongly when wetted. 1 g carries as much Mg as 2.05 g heptahydrate: confusing the two is the commonest factor-of-two error.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'Mg(NO3)2.6H2O',
    name: 'Magnesium nitrate hexahydrate',
    commonNames: ['magnesium nitrate hexahydrate'],
    iupacName: {
      value: 'magnesium nitrate hexahydrate',
      source: 'memory',
    },
    formula: 'Mg(NO3)2·6H2O',
    cas: {
      value: '13446-18-9',
      source: 'memory',
    },
    molarMass: {
      value: 256.403,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        H: 0.047176,
        Mg: 0.094792,
        N: 0.109258,
        O: 0.748774,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        NO3: 0.483645,
        N_as_nitrate: 0.109258,
        MgO: 0.15719,
        hardness_meq_per_g: 7.800221,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.421563,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [197.49, 215.33, 239.38, 256.1, 274.55, 320.87],
      anhydrousPer100gTotalWater: [62.34, 65.29, 68.92, 71.23, 73.61, 78.89],
      anhydrousMassPercent: [38.4, 39.5, 40.8, 41.6, 42.4, 44.1],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.8,
      high: 1.0,
      source: 'memory',
    },
    appearance: {
      value: 'colourless crystals or flakes',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'very high (deliquescent)',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H272', 'H319'],
      signalWord: 'Warning',
      source: 'memory',
    },
    transport: {
      value: 'UN1474, class 5.1, packing group III',
      source: 'memory',
    },
    regulatoryFlags: [
      {
        list: 'reportable',
        value: 'EU Reg. 2019/1148 Annex II (reportable: suspicious transactions, losses, thefts)',
        source: 'published: dutchchems.com/precursors summary of the regulation',
      },
      {
        list: 'reportable',
        value: 'GB Poisons Act 1972 Sch. 1A Part 3 (reportable)',
        source: 'published: SI 2018/451 note',
      },
    ],
    storage: {
      value:
        'Cool, dry, closed; keep apart from paper, wood dust, sugar, oils, solvents, metal powders, acids and any heat source; never in an unlabelled food jar.',
      source: 'memory',
    },
    supplies: ['N', 'Mg'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'MgCl2.6H2O',
    name: 'Magnesium chloride hexahydrate',
    commonNames: ['magnesium chloride hexahydrate', 'bischofite'],
    iupacName: {
      value: 'magnesium chloride hexahydrate',
      source: 'memory',
    },
    formula: 'MgCl2·6H2O',
    cas: {
      value: '7791-18-6',
      source: 'memory',
    },
    molarMass: {
      value: 203.295,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Cl: 0.348754,
        H: 0.0595,
        Mg: 0.119555,
        O: 0.472191,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        MgO: 0.198254,
        hardness_meq_per_g: 9.83792,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.53169,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [263.85, 290.88, 316.24, 328.42, 340.51, 365.47],
      anhydrousPer100gTotalWater: [51.42, 53.49, 55.23, 56.01, 56.74, 58.15],
      anhydrousMassPercent: [33.96, 34.85, 35.58, 35.9, 36.2, 36.77],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.8,
      high: 1.0,
      source: 'memory',
    },
    appearance: {
      value: 'colourless to white flakes',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'very high (deliquescent, about 33 % RH)',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Mg', 'Cl'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'Ca(NO3)2.4H2O',
    name: 'Calcium nitrate tetrahydrate',
    commonNames: ['calcium nitrate tetrahydrate'],
    iupacName: {
      value: 'calcium nitrate tetrahydrate',
      source: 'memory',
    },
    formula: 'Ca(NO3)2·4H2O',
    cas: {
      value: '13477-34-4',
      source: 'published: SDS docslib 3693624',
    },
    molarMass: {
      value: 236.146,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Ca: 0.169717,
        H: 0.034148,
        N: 0.11863,
        O: 0.677505,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        NO3: 0.525133,
        N_as_nitrate: 0.11863,
        CaO: 0.237467,
        hardness_meq_per_g: 8.469337,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.30515,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [258.45, 324.08, 443.49, 562.71, 709.38, 1600.99],
      anhydrousPer100gTotalWater: [100.4, 113.22, 130.95, 143.9, 155.75, 189.02],
      anhydrousMassPercent: [50.1, 53.1, 56.7, 59.0, 60.9, 65.4],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.9,
      high: 1.2,
      source: 'memory',
    },
    appearance: {
      value: 'colourless crystals, often wet-looking; melts in its own water near 43 °C (memory)',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'very high (deliquescent)',
      criticalHumidity: 46.7,
      source:
        'published: critical relative humidity at 30 °C, Wikipedia "Critical relative humidity" (as of 2023-10)',
    },
    ghs: {
      statements: ['H302', 'H318'],
      signalWord: 'Danger',
      source: 'memory (lab suppliers add H272)',
    },
    transport: {
      value: 'UN1454, class 5.1, packing group III (pure salt)',
      source: 'memory',
    },
    regulatoryFlags: [
      {
        list: 'reportable',
        value: 'EU Reg. 2019/1148 Annex II (reportable: suspicious transactions, losses, thefts)',
        source: 'published: dutchchems.com/precursors summary of the regulation',
      },
      {
        list: 'reportable',
        value: 'GB Poisons Act 1972 Sch. 1A Part 3 (reportable)',
        source: 'published: Wikipedia page on SI 2023/63 and legislation.gov.uk SI 2023/63 reg. 8',
      },
    ],
    storage: {
      value:
        'Cool, dry, closed; keep apart from paper, wood dust, sugar, oils, solvents, metal powders, acids and any heat source; never in an unlabelled food jar.',
      source: 'memory',
    },
    supplies: ['N', 'Ca'],
    notes: [],
    labelAssay: null,
  },
  {
    id: '5Ca(NO3)2.NH4NO3.10H2O',
    name: 'Calcium ammonium nitrate double salt',
    commonNames: [
      'calcium ammonium nitrate double salt',
      'greenhouse-grade calcium nitrate',
      '15.5-0-0',
    ],
    iupacName: {
      value: 'pentacalcium ammonium nitrate decahydrate',
      source: 'memory',
    },
    formula: '5Ca(NO3)2·NH4NO3·10H2O',
    cas: {
      value: '15245-12-2',
      source: 'memory',
    },
    molarMass: {
      value: 1080.623,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Ca: 0.185439,
        H: 0.022387,
        N: 0.155544,
        O: 0.63663,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        NO3: 0.631158,
        N_as_nitrate: 0.142582,
        NH4: 0.016693,
        N_as_ammonium: 0.012962,
        CaO: 0.259466,
        hardness_meq_per_g: 9.253921,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.166709,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [null, null, 120, null, null, null],
      anhydrousPer100gTotalWater: null,
      anhydrousMassPercent: null,
      note: 'about 1.2 kg/L water, supplier-type figure',
      source: 'memory',
    },
    bulkDensity: {
      low: 1.0,
      high: 1.15,
      source: 'memory',
    },
    appearance: {
      value: 'white prills, oily film',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'very high',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H302', 'H318'],
      signalWord: 'Danger',
      source: 'published: supplier SDS (scribd 461720132)',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [
      {
        list: 'reportable',
        value: 'EU Reg. 2019/1148 Annex II as calcium ammonium nitrate (reportable)',
        source: 'published: dutchchems.com/precursors summary of the regulation',
      },
      {
        list: 'reportable',
        value: 'GB Poisons Act 1972 Sch. 1A Part 3 (reportable)',
        source: 'published: Wikipedia page on SI 2023/63 and legislation.gov.uk SI 2023/63 reg. 8',
      },
    ],
    storage: {
      value:
        'Cool, dry, closed; keep apart from paper, wood dust, sugar, oils, solvents, metal powders, acids and any heat source; never in an unlabelled food jar.',
      source: 'memory',
    },
    supplies: ['N', 'Ca'],
    notes: [
      {
        value:
          'Usually sold simply as "calcium nitrate": it is 15.5 % N including about 1.1-1.3 % ammonium N, and 19 % Ca, so it is NOT the tetrahydrate.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'CaSO4.2H2O',
    name: 'Gypsum',
    commonNames: ['gypsum', 'calcium sulfate dihydrate'],
    iupacName: {
      value: 'calcium sulfate dihydrate',
      source: 'memory',
    },
    formula: 'CaSO4·2H2O',
    cas: {
      value: '10101-41-4',
      source: 'memory',
    },
    molarMass: {
      value: 172.164,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Ca: 0.23279,
        H: 0.02342,
        O: 0.557573,
        S: 0.186218,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        CaO: 0.325719,
        SO4: 0.557933,
        hardness_meq_per_g: 11.61683,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.209277,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [0.2205, 0.2421, 0.2561, 0.2599, 0.2637, 0.2663],
      anhydrousPer100gTotalWater: [0.1743, 0.1914, 0.2024, 0.2054, 0.2084, 0.2104],
      anhydrousMassPercent: [0.174, 0.191, 0.20199999999999999, 0.205, 0.20800000000000002, 0.21],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.7,
      high: 1.1,
      source: 'memory',
    },
    appearance: {
      value: 'white powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'very low',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Ca', 'S'],
    notes: [
      {
        value:
          'About 2.5 g/L at most: dose as dry powder to the tank or in dilute water, never as concentrate. Solubility hardly changes with temperature.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'CaCl2',
    name: 'Calcium chloride anhydrous',
    commonNames: ['calcium chloride anhydrous'],
    iupacName: {
      value: 'calcium chloride',
      source: 'memory',
    },
    formula: 'CaCl2',
    cas: {
      value: '10043-52-4',
      source: 'memory',
    },
    molarMass: {
      value: 110.978,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Ca: 0.361135,
        Cl: 0.638865,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        CaO: 0.505298,
        hardness_meq_per_g: 18.02159,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [57.98, 64.45, 72.8, 81.26, 96.54, 112.09],
      anhydrousPer100gTotalWater: [57.98, 64.45, 72.8, 81.26, 96.54, 112.09],
      anhydrousMassPercent: [36.7, 39.19, 42.13, 44.83, 49.12, 52.85],
      note: 'solid phase changes (6H2O, 4H2O, 2H2O) across 25-60 °C',
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.8,
      high: 1.0,
      source: 'memory',
    },
    appearance: {
      value: 'white pellets or powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'extreme (drying agent)',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H319'],
      signalWord: 'Warning',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Ca', 'Cl'],
    notes: [
      {
        value: 'Strong heat on dissolving (about -82 kJ/mol, memory): add slowly to cold water.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'CaCl2.2H2O',
    name: 'Calcium chloride dihydrate',
    commonNames: ['calcium chloride dihydrate'],
    iupacName: {
      value: 'calcium chloride dihydrate',
      source: 'memory',
    },
    formula: 'CaCl2·2H2O',
    cas: {
      value: '10035-04-8',
      source: 'memory',
    },
    molarMass: {
      value: 147.008,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Ca: 0.272625,
        Cl: 0.482287,
        H: 0.027427,
        O: 0.217662,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        CaO: 0.381455,
        hardness_meq_per_g: 13.604702,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.245089,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [94.61, 107.96, 126.28, 146.21, 186.26, 233.42],
      anhydrousPer100gTotalWater: [57.98, 64.45, 72.8, 81.26, 96.54, 112.09],
      anhydrousMassPercent: [36.7, 39.19, 42.13, 44.83, 49.12, 52.85],
      note: 'solid phase changes (6H2O, 4H2O, 2H2O) across 25-60 °C',
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.8,
      high: 1.0,
      source: 'memory',
    },
    appearance: {
      value: 'white flakes or granules',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'very high (deliquescent)',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H319'],
      signalWord: 'Warning',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Ca', 'Cl'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'CaCO3',
    name: 'Calcium carbonate',
    commonNames: ['calcium carbonate', 'chalk', 'limestone'],
    iupacName: {
      value: 'calcium carbonate',
      source: 'memory',
    },
    formula: 'CaCO3',
    cas: {
      value: '471-34-1',
      source: 'memory',
    },
    molarMass: {
      value: 100.086,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        C: 0.120007,
        Ca: 0.400436,
        O: 0.479558,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        CaO: 0.560288,
        alkalinity_meq_per_g: 19.982815,
        hardness_meq_per_g: 19.982815,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [null, null, null, 0.0013, null, null],
      anhydrousPer100gTotalWater: null,
      anhydrousMassPercent: null,
      note: 'CO2-free water; rises to about 0.006 in air-equilibrated and about 0.1 in CO2-saturated water',
      source: 'memory',
    },
    bulkDensity: {
      low: 0.5,
      high: 1.3,
      source: 'memory',
    },
    appearance: {
      value: 'white powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'none',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Ca', 'KH'],
    notes: [
      {
        value: 'Dissolves only as fast as CO2 or acid is supplied; never a stock-solution salt.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'NaHCO3',
    name: 'Baking soda',
    commonNames: ['baking soda', 'sodium bicarbonate'],
    iupacName: {
      value: 'sodium hydrogencarbonate',
      source: 'memory',
    },
    formula: 'NaHCO3',
    cas: {
      value: '144-55-8',
      source: 'memory',
    },
    molarMass: {
      value: 84.006,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        C: 0.142978,
        H: 0.011999,
        Na: 0.273671,
        O: 0.571352,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        alkalinity_meq_per_g: 11.903912,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [6.93, 8.21, 9.57, 10.28, 11.0, 12.52],
      anhydrousPer100gTotalWater: [6.93, 8.21, 9.57, 10.28, 11.0, 12.52],
      anhydrousMassPercent: [6.48, 7.59, 8.73, 9.32, 9.91, 11.13],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.7,
      high: 1.1,
      source: 'memory',
    },
    appearance: {
      value: 'white fine powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'low',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['KH', 'Na'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'Na2CO3',
    name: 'Soda ash',
    commonNames: ['soda ash', 'washing soda anhydrous'],
    iupacName: {
      value: 'disodium carbonate',
      source: 'memory',
    },
    formula: 'Na2CO3',
    cas: {
      value: '497-19-8',
      source: 'memory',
    },
    molarMass: {
      value: 105.988,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        C: 0.113324,
        Na: 0.433823,
        O: 0.452853,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        alkalinity_meq_per_g: 18.870061,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [6.88, 12.11, 21.8, 30.72, 40.25, 48.81],
      anhydrousPer100gTotalWater: [6.88, 12.11, 21.8, 30.72, 40.25, 48.81],
      anhydrousMassPercent: [6.44, 10.8, 17.9, 23.5, 28.7, 32.8],
      note: 'decahydrate below 32 °C, then 7H2O/1H2O: retrograde above about 40 °C',
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.5,
      high: 1.1,
      source: 'memory',
    },
    appearance: {
      value: 'white powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'moderate',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H319'],
      signalWord: 'Warning',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['KH', 'Na'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'NaCl',
    name: 'Common salt',
    commonNames: ['common salt', 'sodium chloride'],
    iupacName: {
      value: 'sodium chloride',
      source: 'memory',
    },
    formula: 'NaCl',
    cas: {
      value: '7647-14-5',
      source: 'memory',
    },
    molarMass: {
      value: 58.44,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Cl: 0.606605,
        Na: 0.393395,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {},
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [35.65, 35.72, 35.89, 35.96, 36.09, 36.37],
      anhydrousPer100gTotalWater: [35.65, 35.72, 35.89, 35.96, 36.09, 36.37],
      anhydrousMassPercent: [26.28, 26.32, 26.41, 26.45, 26.52, 26.67],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 1.1,
      high: 1.3,
      source: 'memory',
    },
    appearance: {
      value: 'white crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'moderate (75 % RH)',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Na', 'Cl'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'NaNO3',
    name: 'Sodium nitrate',
    commonNames: ['sodium nitrate', 'Chile saltpetre'],
    iupacName: {
      value: 'sodium nitrate',
      source: 'memory',
    },
    formula: 'NaNO3',
    cas: {
      value: '7631-99-4',
      source: 'memory',
    },
    molarMass: {
      value: 84.994,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        N: 0.1648,
        Na: 0.27049,
        O: 0.56471,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        NO3: 0.72951,
        N_as_nitrate: 0.1648,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [73.01, 79.86, 87.27, 91.2, 95.31, 104.08],
      anhydrousPer100gTotalWater: [73.01, 79.86, 87.27, 91.2, 95.31, 104.08],
      anhydrousMassPercent: [42.2, 44.4, 46.6, 47.7, 48.8, 51.0],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 1.1,
      high: 1.4,
      source: 'memory',
    },
    appearance: {
      value: 'white crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'moderate',
      criticalHumidity: 72.4,
      source:
        'published: critical relative humidity at 30 °C, Wikipedia "Critical relative humidity" (as of 2023-10)',
    },
    ghs: {
      statements: ['H272', 'H319'],
      signalWord: 'Warning',
      source: 'memory',
    },
    transport: {
      value: 'UN1498, class 5.1, packing group III',
      source: 'memory',
    },
    regulatoryFlags: [
      {
        list: 'reportable',
        value: 'EU Reg. 2019/1148 Annex II (reportable: suspicious transactions, losses, thefts)',
        source: 'published: dutchchems.com/precursors summary of the regulation',
      },
      {
        list: 'reportable',
        value: 'GB Poisons Act 1972 Sch. 1A Part 3 (reportable)',
        source: 'published: Wikipedia page on SI 2023/63 and legislation.gov.uk SI 2023/63 reg. 8',
      },
    ],
    storage: {
      value:
        'Cool, dry, closed; keep apart from paper, wood dust, sugar, oils, solvents, metal powders, acids and any heat source; never in an unlabelled food jar.',
      source: 'memory',
    },
    supplies: ['N', 'Na'],
    notes: [],
    labelAssay: null,
  },
  {
    id: '(NH4)2SO4',
    name: 'Ammonium sulfate',
    commonNames: ['ammonium sulfate', 'sulphate of ammonia', '21-0-0-24S'],
    iupacName: {
      value: 'diammonium sulfate',
      source: 'memory',
    },
    formula: '(NH4)2SO4',
    cas: {
      value: '7783-20-2',
      source: 'memory',
    },
    molarMass: {
      value: 132.134,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        H: 0.061029,
        N: 0.212012,
        O: 0.484327,
        S: 0.242632,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        NH4: 0.273041,
        N_as_ammonium: 0.212012,
        SO4: 0.726959,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [70.36, 72.71, 75.13, 76.37, 77.94, 80.83],
      anhydrousPer100gTotalWater: [70.36, 72.71, 75.13, 76.37, 77.94, 80.83],
      anhydrousMassPercent: [41.3, 42.1, 42.9, 43.3, 43.8, 44.7],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 1.01,
      high: 1.06,
      source:
        'published: typical fertiliser bulk densities, studylib.net/doc/18119690 (lb/cu ft, converted) (crystal 63-66)',
    },
    appearance: {
      value: 'white to tan crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'moderate',
      criticalHumidity: 79.2,
      source:
        'published: critical relative humidity at 30 °C, Wikipedia "Critical relative humidity" (as of 2023-10)',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['N', 'S'],
    notes: [
      {
        value: 'Ammonium source: see toxicity section before dosing any inhabited tank.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'NH4NO3',
    name: 'Ammonium nitrate',
    commonNames: ['ammonium nitrate'],
    iupacName: {
      value: 'ammonium nitrate',
      source: 'memory',
    },
    formula: 'NH4NO3',
    cas: {
      value: '6484-52-2',
      source: 'published: SI 2023/63 reg. 8',
    },
    molarMass: {
      value: 80.043,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        H: 0.050373,
        N: 0.349987,
        O: 0.59964,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        NO3: 0.774634,
        N_as_nitrate: 0.174993,
        NH4: 0.225366,
        N_as_ammonium: 0.174993,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [117.39, 150.63, 189.86, 212.5, 236.7, 289.11],
      anhydrousPer100gTotalWater: [117.39, 150.63, 189.86, 212.5, 236.7, 289.11],
      anhydrousMassPercent: [54.0, 60.1, 65.5, 68.0, 70.3, 74.3],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.865,
      high: 0.93,
      source:
        'published: typical fertiliser bulk densities, studylib.net/doc/18119690 (lb/cu ft, converted) (prill 54-58)',
    },
    appearance: {
      value: 'white prills or crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'very high',
      criticalHumidity: 59.4,
      source:
        'published: critical relative humidity at 30 °C, Wikipedia "Critical relative humidity" (as of 2023-10)',
    },
    ghs: {
      statements: ['H272', 'H319'],
      signalWord: 'Warning',
      source: 'memory',
    },
    transport: {
      value: 'UN1942, class 5.1, packing group III',
      source: 'memory',
    },
    regulatoryFlags: [
      {
        list: 'restricted',
        value:
          'EU Reg. 2019/1148 Annex I (restricted: not for the general public at 16 % N or more from ammonium nitrate; no licensing possible)',
        source: 'published: dutchchems.com/precursors summary of the regulation',
      },
      {
        list: 'restricted',
        value: 'GB Poisons Act 1972 Sch. 1A Part 1 (regulated since 1 Oct 2023 at 16 % N or more)',
        source: 'published: Wikipedia page on SI 2023/63 and legislation.gov.uk SI 2023/63 reg. 8',
      },
    ],
    storage: {
      value:
        'Cool, dry, closed; keep apart from paper, wood dust, sugar, oils, solvents, metal powders, acids and any heat source; never in an unlabelled food jar.',
      source: 'memory',
    },
    supplies: ['N'],
    notes: [
      {
        value: 'A club group-buy should refuse this substance outright.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'NH4Cl',
    name: 'Ammonium chloride',
    commonNames: ['ammonium chloride', 'sal ammoniac'],
    iupacName: {
      value: 'ammonium chloride',
      source: 'memory',
    },
    formula: 'NH4Cl',
    cas: {
      value: '12125-02-9',
      source: 'memory',
    },
    molarMass: {
      value: 53.489,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Cl: 0.662753,
        H: 0.07538,
        N: 0.261867,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        NH4: 0.337247,
        N_as_ammonium: 0.261867,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [29.74, 33.55, 37.49, 39.55, 41.62, 45.9],
      anhydrousPer100gTotalWater: [29.74, 33.55, 37.49, 39.55, 41.62, 45.9],
      anhydrousMassPercent: [22.92, 25.12, 27.27, 28.34, 29.39, 31.46],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.6,
      high: 0.9,
      source: 'memory',
    },
    appearance: {
      value: 'white crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'moderate',
      criticalHumidity: 77.2,
      source:
        'published: critical relative humidity at 30 °C, Wikipedia "Critical relative humidity" (as of 2023-10)',
    },
    ghs: {
      statements: ['H302', 'H319'],
      signalWord: 'Warning',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['N', 'Cl'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'NH4H2PO4',
    name: 'Monoammonium phosphate',
    commonNames: ['monoammonium phosphate', 'MAP', '12-61-0'],
    iupacName: {
      value: 'ammonium dihydrogen phosphate',
      source: 'memory',
    },
    formula: 'NH4H2PO4',
    cas: {
      value: '7722-76-1',
      source: 'memory',
    },
    molarMass: {
      value: 115.025,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        H: 0.05258,
        N: 0.121774,
        O: 0.556366,
        P: 0.269281,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        NH4: 0.156827,
        N_as_ammonium: 0.121774,
        PO4: 0.825647,
        P2O5: 0.617009,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [21.65, 28.21, 35.87, 40.45, 45.35, 56.74],
      anhydrousPer100gTotalWater: [21.65, 28.21, 35.87, 40.45, 45.35, 56.74],
      anhydrousMassPercent: [17.8, 22.0, 26.4, 28.8, 31.2, 36.2],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.96,
      high: 1.04,
      source:
        'published: typical fertiliser bulk densities, studylib.net/doc/18119690 (lb/cu ft, converted) (60-65)',
    },
    appearance: {
      value: 'white crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'low',
      criticalHumidity: 91.6,
      source:
        'published: critical relative humidity at 30 °C, Wikipedia "Critical relative humidity" (as of 2023-10)',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['N', 'P'],
    notes: [],
    labelAssay: null,
  },
  {
    id: '(NH4)2HPO4',
    name: 'Diammonium phosphate',
    commonNames: ['diammonium phosphate', 'DAP'],
    iupacName: {
      value: 'diammonium hydrogen phosphate',
      source: 'memory',
    },
    formula: '(NH4)2HPO4',
    cas: {
      value: '7783-28-0',
      source: 'memory',
    },
    molarMass: {
      value: 132.056,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        H: 0.068698,
        N: 0.212137,
        O: 0.484613,
        P: 0.234552,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        NH4: 0.273202,
        N_as_ammonium: 0.212137,
        PO4: 0.719165,
        P2O5: 0.537435,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [57.23, 61.81, 66.67, 69.49, 72.41, 78.89],
      anhydrousPer100gTotalWater: [57.23, 61.81, 66.67, 69.49, 72.41, 78.89],
      anhydrousMassPercent: [36.4, 38.2, 40.0, 41.0, 42.0, 44.1],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.88,
      high: 0.96,
      source:
        'published: typical fertiliser bulk densities, studylib.net/doc/18119690 (lb/cu ft, converted) (55-60)',
    },
    appearance: {
      value: 'white crystals or grey granules',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'moderate',
      criticalHumidity: 82.5,
      source:
        'published: critical relative humidity at 30 °C, Wikipedia "Critical relative humidity" (as of 2023-10)',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['N', 'P'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'CO(NH2)2',
    name: 'Urea',
    commonNames: ['urea', 'carbamide', '46-0-0'],
    iupacName: {
      value: 'carbonic diamide',
      source: 'memory',
    },
    formula: 'CO(NH2)2',
    cas: {
      value: '57-13-6',
      source: 'memory',
    },
    molarMass: {
      value: 60.056,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        C: 0.199997,
        H: 0.067137,
        N: 0.466465,
        O: 0.266401,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        N_as_urea: 0.466465,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [66.7, 85, 108, null, 135, 167],
      anhydrousPer100gTotalWater: null,
      anhydrousMassPercent: null,
      note: null,
      source: 'memory',
    },
    bulkDensity: {
      low: 0.705,
      high: 0.77,
      source:
        'published: typical fertiliser bulk densities, studylib.net/doc/18119690 (lb/cu ft, converted) (granular 44-48)',
    },
    appearance: {
      value: 'white prills',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'high',
      criticalHumidity: 72.5,
      source:
        'published: critical relative humidity at 30 °C, Wikipedia "Critical relative humidity" (as of 2023-10)',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['N'],
    notes: [
      {
        value:
          'Not an ion: invisible to conductivity meters and nitrate tests, and becomes ammonium once urease bacteria or plants hydrolyse it. Count its N as potential ammonia.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'FeSO4.7H2O',
    name: 'Ferrous sulfate heptahydrate',
    commonNames: ['ferrous sulfate heptahydrate', 'green vitriol', 'copperas'],
    iupacName: {
      value: 'iron(II) sulfate heptahydrate',
      source: 'memory',
    },
    formula: 'FeSO4·7H2O',
    cas: {
      value: '7782-63-0',
      source: 'published: SDS paperzz 8464516',
    },
    molarMass: {
      value: 278.006,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Fe: 0.200877,
        H: 0.050761,
        O: 0.63304,
        S: 0.115321,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        SO4: 0.345518,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.453605,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [32.82, 45.17, 61.47, 71.61, 83.11, 111.46],
      anhydrousPer100gTotalWater: [15.61, 20.48, 26.26, 29.53, 32.98, 40.45],
      anhydrousMassPercent: [13.5, 17.0, 20.8, 22.8, 24.8, 28.8],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.8,
      high: 1.1,
      source: 'memory',
    },
    appearance: {
      value: 'pale green crystals, brown crust when oxidised',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'effloresces and oxidises',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H302', 'H315', 'H319'],
      signalWord: 'Warning',
      source: 'published: SDS paperzz 8464516 (H302, H315); H319 from memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Fe'],
    notes: [
      {
        value:
          'Unchelated: oxidises to rust-brown hydroxide within hours at neutral pH; precipitates phosphate.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'FeEDTA',
    name: 'Iron EDTA',
    commonNames: ['iron EDTA', 'sodium ferric EDTA trihydrate', 'Fe-EDTA 13 %'],
    iupacName: {
      value: 'sodium [ethylenediaminetetraacetato(4-)]ferrate(III) trihydrate',
      source: 'memory',
    },
    formula: 'C10H12FeN2NaO8·3H2O',
    cas: {
      value: '18154-32-0',
      source: 'memory',
    },
    molarMass: {
      value: 421.092,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        C: 0.285235,
        Fe: 0.132619,
        H: 0.043088,
        N: 0.066527,
        Na: 0.054596,
        O: 0.417935,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {},
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.128345,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [null, null, 9, null, null, null],
      anhydrousPer100gTotalWater: null,
      anhydrousMassPercent: null,
      note: 'about 90 g/L',
      source: 'memory',
    },
    bulkDensity: {
      low: 0.6,
      high: 0.9,
      source: 'memory',
    },
    appearance: {
      value: 'yellow-brown (khaki) powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'moderate',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Fe'],
    notes: [
      {
        value:
          'Use the Fe % printed on the bag (commonly 13 %), not the theoretical value. Chelate useful to about pH 6.5; light destroys it.',
        source: 'memory',
      },
    ],
    labelAssay: {
      values: {
        Fe: 0.13,
      },
      source: 'memory',
    },
  },
  {
    id: 'FeDTPA',
    name: 'Iron DTPA',
    commonNames: ['iron DTPA', 'Fe-DTPA 11 %'],
    iupacName: {
      value: 'sodium hydrogen ferric diethylenetriaminepentaacetate',
      source: 'memory',
    },
    formula: 'C14H19FeN3NaO10',
    cas: {
      value: '12389-75-2',
      source: 'published: supplier documentation hub (benchchem B1401466)',
    },
    molarMass: {
      value: 468.152,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        C: 0.359187,
        Fe: 0.119288,
        H: 0.04091,
        N: 0.089759,
        Na: 0.049108,
        O: 0.341748,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {},
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [null, null, 10, null, null, null],
      anhydrousPer100gTotalWater: null,
      anhydrousMassPercent: null,
      note: 'about 100 g/L or more',
      source: 'memory',
    },
    bulkDensity: {
      low: 0.5,
      high: 0.9,
      source: 'memory',
    },
    appearance: {
      value: 'yellow-brown powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'moderate',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Fe'],
    notes: [
      {
        value:
          'Trade grades: 11 % powder, 6-7 % lower grade, 3 % liquid. Useful to about pH 7-7.5.',
        source: 'memory',
      },
    ],
    labelAssay: {
      values: {
        Fe: 0.11,
      },
      source: 'memory',
    },
  },
  {
    id: 'FeEDDHA',
    name: 'Iron EDDHA',
    commonNames: ['iron EDDHA', 'Fe-EDDHA 6 %'],
    iupacName: {
      value: "sodium ferric ethylenediamine-N,N'-bis(2-hydroxyphenylacetate)",
      source: 'memory',
    },
    formula: 'C18H16FeN2NaO6',
    cas: {
      value: '16455-61-1',
      source: 'memory',
    },
    molarMass: {
      value: 435.169,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        C: 0.496814,
        Fe: 0.128329,
        H: 0.037061,
        N: 0.064375,
        Na: 0.05283,
        O: 0.22059,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {},
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [null, null, 6, null, null, null],
      anhydrousPer100gTotalWater: null,
      anhydrousMassPercent: null,
      note: 'about 60 g/L',
      source: 'memory',
    },
    bulkDensity: {
      low: 0.6,
      high: 0.9,
      source: 'memory',
    },
    appearance: {
      value: 'dark red-brown to black powder; colours water wine-red',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'moderate',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Fe'],
    notes: [
      {
        value:
          'Commercial product is 6 % Fe (4.8 % ortho-ortho), less than half the theoretical 12.8 %. Stable to pH 9 or above. Tints the tank red.',
        source: 'memory',
      },
    ],
    labelAssay: {
      values: {
        Fe: 0.06,
        Fe_ortho_ortho: 0.048,
      },
      source: 'memory',
    },
  },
  {
    id: 'FeGluconate.2H2O',
    name: 'Ferrous gluconate dihydrate',
    commonNames: ['ferrous gluconate dihydrate'],
    iupacName: {
      value: 'iron(II) D-gluconate dihydrate',
      source: 'memory',
    },
    formula: 'C12H22FeO14·2H2O',
    cas: {
      value: '12389-15-0',
      source: 'memory',
    },
    molarMass: {
      value: 482.169,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        C: 0.298924,
        Fe: 0.11582,
        H: 0.054354,
        O: 0.530901,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {},
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.074725,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [null, null, null, 8, null, null],
      anhydrousPer100gTotalWater: null,
      anhydrousMassPercent: null,
      note: 'about 80 g/L warm',
      source: 'memory',
    },
    bulkDensity: {
      low: 0.6,
      high: 0.9,
      source: 'memory',
    },
    appearance: {
      value: 'yellow-grey to greenish powder, caramel smell',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'low',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Fe'],
    notes: [
      {
        value:
          'Organic carbon: solution grows mould and bacteria within days; refrigerate, acidify or make weekly.',
        source: 'memory',
      },
    ],
    labelAssay: {
      values: {
        Fe: 0.115,
      },
      source: 'memory',
    },
  },
  {
    id: 'MnSO4.H2O',
    name: 'Manganese sulfate monohydrate',
    commonNames: ['manganese sulfate monohydrate'],
    iupacName: {
      value: 'manganese(II) sulfate monohydrate',
      source: 'memory',
    },
    formula: 'MnSO4·H2O',
    cas: {
      value: '10034-96-5',
      source: 'memory',
    },
    molarMass: {
      value: 169.009,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        H: 0.011928,
        Mn: 0.32506,
        O: 0.473318,
        S: 0.189694,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        SO4: 0.568348,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.106592,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [63.21, 71.67, 76.07, 77.12, 77.12, 73.0],
      anhydrousPer100gTotalWater: [52.91, 59.49, 62.87, 63.67, 63.67, 60.51],
      anhydrousMassPercent: [34.6, 37.3, 38.6, 38.9, 38.9, 37.7],
      note: 'stable hydrate changes (5H2O/4H2O/1H2O); solubility peaks near 25-30 °C and then falls',
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 1.0,
      high: 1.4,
      source: 'memory',
    },
    appearance: {
      value: 'pale pink powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'low',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H318', 'H373', 'H411'],
      signalWord: 'Danger',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Locked, dry, separately from food and fish food; original hazard label kept on every split bag; weigh with gloves and eye protection, no dust.',
      source: 'memory',
    },
    supplies: ['Mn'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'MnCl2.4H2O',
    name: 'Manganese chloride tetrahydrate',
    commonNames: ['manganese chloride tetrahydrate'],
    iupacName: {
      value: 'manganese(II) chloride tetrahydrate',
      source: 'memory',
    },
    formula: 'MnCl2·4H2O',
    cas: {
      value: '13446-34-9',
      source: 'memory',
    },
    molarMass: {
      value: 197.898,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Cl: 0.358265,
        H: 0.040748,
        Mn: 0.277608,
        O: 0.323379,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {},
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.364127,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [155.5, 176.62, 201.54, 218.14, 236.67, 283.35],
      anhydrousPer100gTotalWater: [63.13, 68.35, 73.91, 77.3, 80.83, 88.68],
      anhydrousMassPercent: [38.7, 40.6, 42.5, 43.6, 44.7, 47.0],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.9,
      high: 1.2,
      source: 'memory',
    },
    appearance: {
      value: 'pink crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'high',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H301', 'H318', 'H373', 'H411'],
      signalWord: 'Danger',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Locked, dry, separately from food and fish food; original hazard label kept on every split bag; weigh with gloves and eye protection, no dust.',
      source: 'memory',
    },
    supplies: ['Mn', 'Cl'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'ZnSO4.7H2O',
    name: 'Zinc sulfate heptahydrate',
    commonNames: ['zinc sulfate heptahydrate', 'white vitriol'],
    iupacName: {
      value: 'zinc sulfate heptahydrate',
      source: 'memory',
    },
    formula: 'ZnSO4·7H2O',
    cas: {
      value: '7446-20-0',
      source: 'memory',
    },
    molarMass: {
      value: 287.541,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        H: 0.049078,
        O: 0.612048,
        S: 0.111497,
        Zn: 0.227376,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        SO4: 0.33406,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.438564,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [107.6, 132.54, 165.53, 187.27, 212.89, 278.23],
      anhydrousPer100gTotalWater: [41.04, 47.06, 53.85, 57.73, 61.81, 70.36],
      anhydrousMassPercent: [29.1, 32.0, 35.0, 36.6, 38.2, 41.3],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.9,
      high: 1.1,
      source: 'memory',
    },
    appearance: {
      value: 'colourless crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'effloresces',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H302', 'H318', 'H410'],
      signalWord: 'Danger',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Locked, dry, separately from food and fish food; original hazard label kept on every split bag; weigh with gloves and eye protection, no dust.',
      source: 'memory',
    },
    supplies: ['Zn'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'ZnSO4.H2O',
    name: 'Zinc sulfate monohydrate',
    commonNames: ['zinc sulfate monohydrate'],
    iupacName: {
      value: 'zinc sulfate monohydrate',
      source: 'memory',
    },
    formula: 'ZnSO4·H2O',
    cas: {
      value: '7446-19-7',
      source: 'published: SDS docslib 2272473',
    },
    molarMass: {
      value: 179.451,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        H: 0.011234,
        O: 0.445776,
        S: 0.178656,
        Zn: 0.364333,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        SO4: 0.535277,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.10039,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [47.81, 55.21, 63.68, 68.59, 73.8, 84.87],
      anhydrousPer100gTotalWater: [41.04, 47.06, 53.85, 57.73, 61.81, 70.36],
      anhydrousMassPercent: [29.1, 32.0, 35.0, 36.6, 38.2, 41.3],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.9,
      high: 1.3,
      source: 'memory',
    },
    appearance: {
      value: 'white powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'low',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H302', 'H318', 'H410'],
      signalWord: 'Danger',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Locked, dry, separately from food and fish food; original hazard label kept on every split bag; weigh with gloves and eye protection, no dust.',
      source: 'memory',
    },
    supplies: ['Zn'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'CuSO4.5H2O',
    name: 'Copper sulfate pentahydrate',
    commonNames: ['copper sulfate pentahydrate', 'blue vitriol', 'bluestone'],
    iupacName: {
      value: 'copper(II) sulfate pentahydrate',
      source: 'memory',
    },
    formula: 'CuSO4·5H2O',
    cas: {
      value: '7758-99-8',
      source: 'published: SDS (manualshelf.com 100060267)',
    },
    molarMass: {
      value: 249.677,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Cu: 0.254513,
        H: 0.040372,
        O: 0.576709,
        S: 0.128406,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        SO4: 0.384721,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.360766,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [24.07, 29.08, 35.36, 39.2, 43.25, 53.21],
      anhydrousPer100gTotalWater: [14.16, 16.82, 20.05, 21.95, 23.92, 28.53],
      anhydrousMassPercent: [12.4, 14.4, 16.7, 18.0, 19.3, 22.2],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.9,
      high: 1.2,
      source: 'memory',
    },
    appearance: {
      value: 'bright blue crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'low',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H302', 'H318', 'H410'],
      signalWord: 'Danger',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Locked, dry, separately from food and fish food; original hazard label kept on every split bag; weigh with gloves and eye protection, no dust.',
      source: 'memory',
    },
    supplies: ['Cu'],
    notes: [
      {
        value: 'Lethal to shrimps and snails at tens of micrograms Cu per litre in soft water.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'H3BO3',
    name: 'Boric acid',
    commonNames: ['boric acid'],
    iupacName: {
      value: 'trihydroxidoboron',
      source: 'memory',
    },
    formula: 'H3BO3',
    cas: {
      value: '10043-35-3',
      source: 'published: Swedish CLH report for boric acid and borates (docslib 7979826)',
    },
    molarMass: {
      value: 61.831,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        B: 0.174831,
        H: 0.048908,
        O: 0.776261,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {},
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [2.68, 3.7, 5.01, 5.8, 6.69, 8.81],
      anhydrousPer100gTotalWater: [2.68, 3.7, 5.01, 5.8, 6.69, 8.81],
      anhydrousMassPercent: [2.61, 3.57, 4.77, 5.48, 6.27, 8.1],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.7,
      high: 1.0,
      source: 'memory',
    },
    appearance: {
      value: 'white flakes or powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'very low',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H360FD'],
      signalWord: 'Danger',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Locked, dry, separately from food and fish food; original hazard label kept on every split bag; weigh with gloves and eye protection, no dust.',
      source: 'memory',
    },
    supplies: ['B'],
    notes: [
      {
        value:
          'Reproductive toxicant cat. 1B in the EU: sale of the substance to the general public is restricted under REACH Annex XVII entry 30 (memory). Clubs should buy it pre-diluted in a trace mix.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'Na2B4O7.10H2O',
    name: 'Borax',
    commonNames: ['borax'],
    iupacName: {
      value: 'disodium tetraborate decahydrate',
      source: 'memory',
    },
    formula: 'Na2B4O7·10H2O',
    cas: {
      value: '1303-96-4',
      source: 'published: Swedish CLH report (docslib 7979826)',
    },
    molarMass: {
      value: 381.363,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        B: 0.113383,
        H: 0.052863,
        Na: 0.120568,
        O: 0.713187,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        alkalinity_meq_per_g: 5.244347,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.472385,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [2.39, 3.35, 4.97, 6.18, 7.81, 12.88],
      anhydrousPer100gTotalWater: [1.25, 1.74, 2.56, 3.17, 3.97, 6.41],
      anhydrousMassPercent: [1.23, 1.71, 2.5, 3.07, 3.82, 6.02],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.8,
      high: 1.0,
      source: 'memory',
    },
    appearance: {
      value: 'white crystals or powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'effloresces',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H319', 'H360FD'],
      signalWord: 'Danger',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Locked, dry, separately from food and fish food; original hazard label kept on every split bag; weigh with gloves and eye protection, no dust.',
      source: 'memory',
    },
    supplies: ['B', 'Na'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'Na2MoO4.2H2O',
    name: 'Sodium molybdate dihydrate',
    commonNames: ['sodium molybdate dihydrate'],
    iupacName: {
      value: 'disodium molybdate dihydrate',
      source: 'memory',
    },
    formula: 'Na2MoO4·2H2O',
    cas: {
      value: '10102-40-6',
      source: 'memory',
    },
    molarMass: {
      value: 241.956,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        H: 0.016664,
        Mo: 0.39656,
        Na: 0.190035,
        O: 0.396742,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {},
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.148911,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [56.14, 83.79, 86.2, 86.2, 87.84, 89.94],
      anhydrousPer100gTotalWater: [44.09, 63.4, 65.02, 65.02, 66.11, 67.5],
      anhydrousMassPercent: [30.6, 38.8, 39.4, 39.4, 39.8, 40.3],
      note: 'decahydrate below about 10 °C',
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.9,
      high: 1.2,
      source: 'memory',
    },
    appearance: {
      value: 'white crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'low',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Mo'],
    notes: [],
    labelAssay: null,
  },
  {
    id: '(NH4)6Mo7O24.4H2O',
    name: 'Ammonium heptamolybdate tetrahydrate',
    commonNames: ['ammonium heptamolybdate tetrahydrate', 'ammonium molybdate'],
    iupacName: {
      value: 'hexaammonium heptamolybdate tetrahydrate',
      source: 'memory',
    },
    formula: '(NH4)6Mo7O24·4H2O',
    cas: {
      value: '12054-85-2',
      source: 'memory',
    },
    molarMass: {
      value: 1235.92,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        H: 0.026099,
        Mo: 0.543441,
        N: 0.068,
        O: 0.36246,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        NH4: 0.087574,
        N_as_ammonium: 0.068,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.058305,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [null, null, 43, null, null, null],
      anhydrousPer100gTotalWater: null,
      anhydrousMassPercent: null,
      note: 'about 400 g/L solution',
      source: 'memory',
    },
    bulkDensity: {
      low: 0.9,
      high: 1.3,
      source: 'memory',
    },
    appearance: {
      value: 'white to faintly green crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'low',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['Mo', 'N'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'CoSO4.7H2O',
    name: 'Cobalt sulfate heptahydrate',
    commonNames: ['cobalt sulfate heptahydrate'],
    iupacName: {
      value: 'cobalt(II) sulfate heptahydrate',
      source: 'memory',
    },
    formula: 'CoSO4·7H2O',
    cas: {
      value: '10026-24-1',
      source: 'memory',
    },
    molarMass: {
      value: 281.094,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Co: 0.209656,
        H: 0.050204,
        O: 0.626086,
        S: 0.114054,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        SO4: 0.341722,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.448622,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [56.47, 71.57, 89.88, 100.96, 112.58, 141.43],
      anhydrousPer100gTotalWater: [24.84, 29.87, 35.32, 38.31, 41.24, 47.71],
      anhydrousMassPercent: [19.9, 23.0, 26.1, 27.7, 29.2, 32.3],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.8,
      high: 1.1,
      source: 'memory',
    },
    appearance: {
      value: 'red-pink crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'effloresces',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H302', 'H317', 'H334', 'H341', 'H350i', 'H360F', 'H410'],
      signalWord: 'Danger',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Locked, dry, separately from food and fish food; original hazard label kept on every split bag; weigh with gloves and eye protection, no dust.',
      source: 'memory',
    },
    supplies: ['Co'],
    notes: [
      {
        value: 'Carcinogen by inhalation: not a group-buy item.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'CoCl2.6H2O',
    name: 'Cobalt chloride hexahydrate',
    commonNames: ['cobalt chloride hexahydrate'],
    iupacName: {
      value: 'cobalt(II) chloride hexahydrate',
      source: 'memory',
    },
    formula: 'CoCl2·6H2O',
    cas: {
      value: '7791-13-1',
      source: 'memory',
    },
    molarMass: {
      value: 237.923,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        Cl: 0.297996,
        Co: 0.247698,
        H: 0.05084,
        O: 0.403467,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {},
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.454307,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [124.85, 148.39, 177.01, 193.71, 212.37, 256.68],
      anhydrousPer100gTotalWater: [43.47, 48.37, 53.54, 56.23, 58.98, 64.66],
      anhydrousMassPercent: [30.3, 32.6, 34.87, 35.99, 37.1, 39.27],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.9,
      high: 1.1,
      source: 'memory',
    },
    appearance: {
      value: 'deep pink to red crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'moderate',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H302', 'H317', 'H334', 'H341', 'H350i', 'H360F', 'H410'],
      signalWord: 'Danger',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Locked, dry, separately from food and fish food; original hazard label kept on every split bag; weigh with gloves and eye protection, no dust.',
      source: 'memory',
    },
    supplies: ['Co', 'Cl'],
    notes: [
      {
        value:
          'Carcinogen by inhalation; REACH candidate-list substance (memory): not a group-buy item.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'NiSO4.6H2O',
    name: 'Nickel sulfate hexahydrate',
    commonNames: ['nickel sulfate hexahydrate'],
    iupacName: {
      value: 'nickel(II) sulfate hexahydrate',
      source: 'memory',
    },
    formula: 'NiSO4·6H2O',
    cas: {
      value: '10101-97-0',
      source: 'memory',
    },
    molarMass: {
      value: 262.839,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        H: 0.046021,
        Ni: 0.223304,
        O: 0.6087,
        S: 0.121976,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        SO4: 0.365456,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.41124,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [57.1, 70.77, 87.05, 95.76, 106.03, 119.07],
      anhydrousPer100gTotalWater: [27.23, 32.28, 37.74, 40.45, 43.47, 47.06],
      anhydrousMassPercent: [21.4, 24.4, 27.4, 28.8, 30.3, 32.0],
      note: 'heptahydrate below about 31 °C (CRC flags the change between 25 and 40 °C)',
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 0.9,
      high: 1.2,
      source: 'memory',
    },
    appearance: {
      value: 'blue-green crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'low',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [
        'H302',
        'H315',
        'H317',
        'H332',
        'H334',
        'H341',
        'H350i',
        'H360D',
        'H372',
        'H410',
      ],
      signalWord: 'Danger',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Locked, dry, separately from food and fish food; original hazard label kept on every split bag; weigh with gloves and eye protection, no dust.',
      source: 'memory',
    },
    supplies: ['Ni'],
    notes: [
      {
        value: 'Carcinogen and strong skin sensitiser: not a group-buy item.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'KI',
    name: 'Potassium iodide',
    commonNames: ['potassium iodide'],
    iupacName: {
      value: 'potassium iodide',
      source: 'memory',
    },
    formula: 'KI',
    cas: {
      value: '7681-11-0',
      source: 'memory',
    },
    molarMass: {
      value: 165.998,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        I: 0.764467,
        K: 0.235533,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        K2O: 0.283723,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [127.27, 135.85, 143.9, 148.14, 152.53, 160.42],
      anhydrousPer100gTotalWater: [127.27, 135.85, 143.9, 148.14, 152.53, 160.42],
      anhydrousMassPercent: [56.0, 57.6, 59.0, 59.7, 60.4, 61.6],
      note: null,
      source:
        'published: CRC Handbook of Chemistry and Physics 98th ed. (Rumble 2017), "Aqueous Solubility of Inorganic Compounds at Various Temperatures", via github chicolucio/solutions @2e6d2b9 data/aqueous_solubility_inorganic_temperatures.csv; converted from mass % by calculation',
    },
    bulkDensity: {
      low: 1.3,
      high: 1.7,
      source: 'memory',
    },
    appearance: {
      value: 'white crystals, yellowing in air and light',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'moderate',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H372'],
      signalWord: 'Danger',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['I', 'K'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'Na2EDTA.2H2O',
    name: 'Disodium EDTA dihydrate',
    commonNames: ['disodium EDTA dihydrate'],
    iupacName: {
      value: 'disodium dihydrogen ethylenediaminetetraacetate dihydrate',
      source: 'memory',
    },
    formula: 'C10H14N2Na2O8·2H2O',
    cas: {
      value: '6381-92-6',
      source: 'memory',
    },
    molarMass: {
      value: 372.238,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        C: 0.32267,
        H: 0.048743,
        N: 0.075258,
        Na: 0.123523,
        O: 0.429806,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {},
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.096793,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [null, null, 10, null, null, null],
      anhydrousPer100gTotalWater: null,
      anhydrousMassPercent: null,
      note: 'about 100 g/L',
      source: 'memory',
    },
    bulkDensity: {
      low: 0.7,
      high: 1.0,
      source: 'memory',
    },
    appearance: {
      value: 'white crystalline powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'low',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H332', 'H373'],
      signalWord: 'Warning',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['chelate'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'K-sorbate',
    name: 'Potassium sorbate',
    commonNames: ['potassium sorbate', 'E202'],
    iupacName: {
      value: 'potassium (2E,4E)-hexa-2,4-dienoate',
      source: 'memory',
    },
    formula: 'C6H7KO2',
    cas: {
      value: '24634-61-5',
      source: 'memory',
    },
    molarMass: {
      value: 150.218,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        C: 0.479743,
        H: 0.046972,
        K: 0.260275,
        O: 0.21301,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {
        K2O: 0.313528,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [null, null, 140, null, null, null],
      anhydrousPer100gTotalWater: null,
      anhydrousMassPercent: null,
      note: 'about 58 % by mass',
      source: 'memory',
    },
    bulkDensity: {
      low: 0.4,
      high: 0.7,
      source: 'memory',
    },
    appearance: {
      value: 'white granules',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'moderate',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H319'],
      signalWord: 'Warning',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['preservative'],
    notes: [
      {
        value: 'Works only below about pH 6.',
        source: 'memory',
      },
    ],
    labelAssay: null,
  },
  {
    id: 'ascorbic-acid',
    name: 'Ascorbic acid',
    commonNames: ['ascorbic acid', 'vitamin C', 'E300'],
    iupacName: {
      value: 'L-ascorbic acid',
      source: 'memory',
    },
    formula: 'C6H8O6',
    cas: {
      value: '50-81-7',
      source: 'memory',
    },
    molarMass: {
      value: 176.124,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        C: 0.409178,
        H: 0.045786,
        O: 0.545036,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {},
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.0,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [null, null, 33, null, null, null],
      anhydrousPer100gTotalWater: null,
      anhydrousMassPercent: null,
      note: 'about 330 g/L',
      source: 'memory',
    },
    bulkDensity: {
      low: 0.6,
      high: 0.9,
      source: 'memory',
    },
    appearance: {
      value: 'white powder',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'low',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: [],
      signalWord: null,
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['preservative', 'antioxidant'],
    notes: [],
    labelAssay: null,
  },
  {
    id: 'citric-acid.H2O',
    name: 'Citric acid monohydrate',
    commonNames: ['citric acid monohydrate', 'E330'],
    iupacName: {
      value: '2-hydroxypropane-1,2,3-tricarboxylic acid monohydrate',
      source: 'memory',
    },
    formula: 'C6H8O7·H2O',
    cas: {
      value: '5949-29-1',
      source: 'memory',
    },
    molarMass: {
      value: 210.138,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    elements: {
      values: {
        C: 0.342946,
        H: 0.047968,
        O: 0.609085,
      },
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    equivalents: {
      values: {},
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    crystalWater: {
      value: 0.085729,
      source: 'calculated: formula x IUPAC 2021 abridged atomic weights',
    },
    solubility: {
      asSoldPer100gAddedWater: [null, null, 160, null, null, null],
      anhydrousPer100gTotalWater: null,
      anhydrousMassPercent: null,
      note: 'about 62 % by mass',
      source: 'memory',
    },
    bulkDensity: {
      low: 0.8,
      high: 1.0,
      source: 'memory',
    },
    appearance: {
      value: 'white crystals',
      source: 'memory',
    },
    hygroscopicity: {
      value: 'moderate',
      criticalHumidity: null,
      source: 'memory',
    },
    ghs: {
      statements: ['H319'],
      signalWord: 'Warning',
      source: 'memory',
    },
    transport: {
      value:
        'not usually classified for carriage in retail quantities, or environmentally hazardous only (check SDS section 14)',
      source: 'memory',
    },
    regulatoryFlags: [],
    storage: {
      value:
        'Airtight plastic tub or sealed bag, dry, labelled, locked away from children, pets and food.',
      source: 'memory',
    },
    supplies: ['acidifier', 'weak chelate'],
    notes: [],
    labelAssay: null,
  },
];

/** How salts of the shipped list keep; nitrates and what is classified follow from their facts. From memory. */
export const storageClasses = {
  takesUpWater: [
    'CaCl2',
    'CaCl2.2H2O',
    'MgCl2.6H2O',
    'Ca(NO3)2.4H2O',
    'Mg(NO3)2.6H2O',
    '5Ca(NO3)2.NH4NO3.10H2O',
    'K2CO3',
    'K2HPO4',
    'NH4NO3',
    'CO(NH2)2',
  ],
  losesWater: ['MgSO4.7H2O', 'FeSO4.7H2O', 'ZnSO4.7H2O', 'Na2B4O7.10H2O'],
  spoilsInAirOrLight: [
    'FeSO4.7H2O',
    'FeGluconate.2H2O',
    'FeEDTA',
    'FeDTPA',
    'FeEDDHA',
    'KI',
    'ascorbic-acid',
  ],
  heatsWhenWetted: ['CaCl2', 'MgSO4', 'K2CO3'],
  acids: ['ascorbic-acid', 'citric-acid.H2O'],
  carbonates: ['KHCO3', 'K2CO3', 'NaHCO3', 'Na2CO3', 'CaCO3'],
} as const;

export type StorageClass = keyof typeof storageClasses;

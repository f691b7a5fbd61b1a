/**
 * The catalogue of substances: what one mole of each adds to a solution. Hydrates, molar masses, strengths, hazards and sources
 * stand in data/substanceFacts.ts and preparation/, so that a bench need not carry them.
 */
export interface Substance {
  /** Of the anhydrous substance. */
  readonly formula: string;
  /** The systematic name first, then traditional names and other spellings. */
  readonly names: readonly string[];
  /** mol of each component that one mol adds. Protons are not counted: the charge balance finds them. */
  readonly gives: Readonly<Record<string, number>>;
}

/** Formula | names | what one mole gives. */
const ROWS = `
HCl|hydrochloric acid, hydrogen chloride|Cl-
HBr|hydrobromic acid, hydrogen bromide|Br-
HI|hydroiodic acid, hydrogen iodide|I-
HNO3|nitric acid|NO3-
HClO4|perchloric acid|ClO4-
H2SO4|sulfuric acid, sulphuric acid|sulfuric
NaOH|sodium hydroxide, caustic soda|Na+
KOH|potassium hydroxide, caustic potash|K+
LiOH|lithium hydroxide|Li+
Ca(OH)2|calcium hydroxide, slaked lime, limewater|Ca+2
Mg(OH)2|magnesium hydroxide|Mg+2
Ba(OH)2|barium hydroxide, baryta|Ba+2
NaCl|sodium chloride, common salt|Na+ Cl-
KCl|potassium chloride|K+ Cl-
LiCl|lithium chloride|Li+ Cl-
NaBr|sodium bromide|Na+ Br-
NaNO3|sodium nitrate|Na+ NO3-
KNO3|potassium nitrate|K+ NO3-
NaClO4|sodium perchlorate|Na+ ClO4-
CaCl2|calcium chloride|Ca+2 2Cl-
MgCl2|magnesium chloride|Mg+2 2Cl-
BaCl2|barium chloride|Ba+2 2Cl-
NaHSO4|sodium hydrogensulfate, sodium bisulfate, sodium hydrogen sulfate|Na+ sulfuric
Na2SO4|sodium sulfate, sodium sulphate|2Na+ sulfuric
K2SO4|potassium sulfate, potassium sulphate|2K+ sulfuric
MgSO4|magnesium sulfate, Epsom salt|Mg+2 sulfuric
(NH4)2SO4|ammonium sulfate, ammonium sulphate|2ammonium sulfuric
CH3COOH|ethanoic acid, acetic acid, C2H4O2, HC2H3O2, CH3CO2H, HOAc|ethanoic
CH3COONa|sodium ethanoate, sodium acetate, NaCH3COO, NaC2H3O2, CH3CO2Na, NaOAc|ethanoic Na+
CH3COOK|potassium ethanoate, potassium acetate, KCH3COO, KC2H3O2|ethanoic K+
CH3COONH4|ammonium ethanoate, ammonium acetate, NH4CH3COO|ethanoic ammonium
HCOOH|methanoic acid, formic acid, CH2O2|methanoic
HCOONa|sodium methanoate, sodium formate, NaHCOO|methanoic Na+
C2H5COOH|propanoic acid, propionic acid, CH3CH2COOH|propanoic
C2H5COONa|sodium propanoate, sodium propionate|propanoic Na+
C6H5COOH|benzoic acid|benzoic
C6H5COONa|sodium benzoate|benzoic Na+
C3H6O3|2-hydroxypropanoic acid, lactic acid, CH3CH(OH)COOH|lactic
C3H5O3Na|sodium 2-hydroxypropanoate, sodium lactate, NaC3H5O3|lactic Na+
C6H8O7|2-hydroxypropane-1,2,3-tricarboxylic acid, citric acid, H3C6H5O7|citric
NaC6H7O7|sodium dihydrogencitrate, sodium dihydrogen citrate, monosodium citrate, NaH2C6H5O7|citric Na+
KC6H7O7|potassium dihydrogencitrate, potassium dihydrogen citrate, KH2C6H5O7|citric K+
Na2C6H6O7|disodium hydrogencitrate, disodium hydrogen citrate, disodium citrate, Na2HC6H5O7|citric 2Na+
Na3C6H5O7|trisodium citrate, sodium citrate, trisodium 2-hydroxypropane-1,2,3-tricarboxylate|citric 3Na+
C4H6O6|2,3-dihydroxybutanedioic acid, tartaric acid, L-tartaric acid, H2C4H4O6|tartaric
KC4H5O6|potassium hydrogentartrate, potassium hydrogen tartrate, cream of tartar, KHC4H4O6|tartaric K+
KNaC4H4O6|potassium sodium tartrate, Rochelle salt|tartaric K+ Na+
C4H6O5|2-hydroxybutanedioic acid, malic acid, H2C4H4O5|malic
C4H6O4|butanedioic acid, succinic acid, H2C4H4O4|succinic
Na2C4H4O4|disodium butanedioate, disodium succinate, sodium succinate|succinic 2Na+
C6H8O6|ascorbic acid, L-ascorbic acid, vitamin C, H2C6H6O6|ascorbic
NaC6H7O6|sodium ascorbate, sodium hydrogenascorbate|ascorbic Na+
H2C2O4|ethanedioic acid, oxalic acid|oxalic
NaHC2O4|sodium hydrogenethanedioate, sodium hydrogenoxalate, sodium hydrogen oxalate|oxalic Na+
Na2C2O4|disodium ethanedioate, sodium oxalate|oxalic 2Na+
KH3(C2O4)2|potassium trihydrogen bis(ethanedioate), potassium tetroxalate, potassium tetraoxalate|2oxalic K+
C8H6O4|benzene-1,2-dicarboxylic acid, phthalic acid, H2C8H4O4|phthalic
KC8H5O4|potassium hydrogenphthalate, potassium hydrogen phthalate, KHP, KHC8H4O4|phthalic K+
K2C8H4O4|dipotassium phthalate|phthalic 2K+
H3BO3|boric acid, B(OH)3, orthoboric acid|boric
Na2B4O7|disodium tetraborate, borax, sodium tetraborate, sodium borate|4boric 2Na+
H3PO4|phosphoric acid, orthophosphoric acid|phosphoric
NaH2PO4|sodium dihydrogenphosphate, sodium dihydrogen phosphate, monosodium phosphate|phosphoric Na+
KH2PO4|potassium dihydrogenphosphate, potassium dihydrogen phosphate, monopotassium phosphate|phosphoric K+
NH4H2PO4|ammonium dihydrogenphosphate, ammonium dihydrogen phosphate, monoammonium phosphate|phosphoric ammonium
Na2HPO4|disodium hydrogenphosphate, disodium hydrogen phosphate, disodium phosphate|phosphoric 2Na+
K2HPO4|dipotassium hydrogenphosphate, dipotassium hydrogen phosphate, dipotassium phosphate|phosphoric 2K+
(NH4)2HPO4|diammonium hydrogenphosphate, diammonium hydrogen phosphate, diammonium phosphate|phosphoric 2ammonium
Na3PO4|trisodium phosphate, sodium phosphate|phosphoric 3Na+
K3PO4|tripotassium phosphate, potassium phosphate|phosphoric 3K+
H4P2O7|diphosphoric acid, pyrophosphoric acid|pyrophosphoric
Na2H2P2O7|disodium dihydrogendiphosphate, disodium pyrophosphate|pyrophosphoric 2Na+
Na4P2O7|tetrasodium diphosphate, sodium pyrophosphate, tetrasodium pyrophosphate|pyrophosphoric 4Na+
CO2|carbon dioxide|carbonic
H2CO3|carbonic acid|carbonic
NaHCO3|sodium hydrogencarbonate, sodium bicarbonate, sodium hydrogen carbonate, baking soda|carbonic Na+
KHCO3|potassium hydrogencarbonate, potassium bicarbonate, potassium hydrogen carbonate|carbonic K+
NH4HCO3|ammonium hydrogencarbonate, ammonium bicarbonate|carbonic ammonium
Na2CO3|sodium carbonate, washing soda, soda ash|carbonic 2Na+
K2CO3|potassium carbonate, potash|carbonic 2K+
CaCO3|calcium carbonate, chalk|carbonic Ca+2
NH3|ammonia, NH4OH, ammonia solution|ammonium
NH4Cl|ammonium chloride, sal ammoniac|ammonium Cl-
NH4NO3|ammonium nitrate|ammonium NO3-
HOCl|hypochlorous acid, HClO|hypochlorous
NaOCl|sodium hypochlorite, NaClO|hypochlorous Na+
Ca(OCl)2|calcium hypochlorite, Ca(ClO)2|2hypochlorous Ca+2
C4H11NO3|2-amino-2-(hydroxymethyl)propane-1,3-diol, tris, trometamol, tris base, tris(hydroxymethyl)aminomethane, (HOCH2)3CNH2|tris
C4H12NO3Cl|tris hydrochloride, tris·HCl, tris-HCl, trometamol hydrochloride|tris Cl-
C2H5NO2|aminoethanoic acid, glycine, NH2CH2COOH|glycine
C2H6NO2Cl|glycine hydrochloride|glycine Cl-
C2H4NO2Na|sodium glycinate|glycine Na+
C8H18N2O4S|2-[4-(2-hydroxyethyl)piperazin-1-yl]ethanesulfonic acid, HEPES|hepes
C8H17N2O4SNa|HEPES sodium salt, sodium HEPES|hepes Na+
C6H13NO4S|2-(morpholin-4-yl)ethanesulfonic acid, MES|mes
C6H12NO4SNa|MES sodium salt, sodium MES|mes Na+
C3H4N2|1H-imidazole, imidazole|imidazole
C3H5N2Cl|imidazole hydrochloride, imidazolium chloride|imidazole Cl-
C6H13NO4|N,N-bis(2-hydroxyethyl)glycine, bicine|bicine
C6H13NO5|N-[tris(hydroxymethyl)methyl]glycine, tricine|tricine
C8H17NO3S|2-(cyclohexylamino)ethanesulfonic acid, CHES|ches
C9H19NO3S|3-(cyclohexylamino)propane-1-sulfonic acid, CAPS|caps
C10H16N2O8|ethylenediaminetetraacetic acid, EDTA, H4EDTA|edta
C10H14N2O8Na2|disodium ethylenediaminetetraacetate, disodium EDTA, Na2H2EDTA|edta 2Na+
C10H12N2O8Na4|tetrasodium ethylenediaminetetraacetate, tetrasodium EDTA|edta 4Na+
`;

function parse(row: string): Substance {
  const [formula, names, gives] = row.split('|') as [string, string, string];
  const parts = gives.split(' ').map((part) => {
    const [, count, component] = /^(\d*)(.+)$/.exec(part) as unknown as [string, string, string];
    return [component, Number(count || 1)] as const;
  });
  return { formula, names: names.split(', '), gives: Object.fromEntries(parts) };
}

export const substances: readonly Substance[] = ROWS.trim().split('\n').map(parse);

/** One spelling for all: 'Na₂CO₃ · 10 H₂O' and 'sodium carbonate decahydrate' are what sodium carbonate is found by. */
const plain = (word: string): string =>
  word
    .normalize('NFKD')
    .trim()
    .toLowerCase()
    .replace(/\s*[·•∙⋅*]\s*/g, '.')
    .replace(/\.\s*\d*\s*h2o$/, '')
    .replace(/\s+(hemi|mono|di|tri|tetra|penta|hexa|hepta|octa|nona|deca|dodeca)?hydrate$/, '')
    .replace(/,?\s+anhydrous$/, '')
    .replace(/\s+/g, ' ');

const byName = new Map<string, Substance>();
for (const substance of substances)
  for (const word of [substance.formula, ...substance.names]) byName.set(plain(word), substance);

/** The substance of a formula or name, in any case and with or without its water of crystallisation. */
export const findSubstance = (name: string): Substance | undefined => byName.get(plain(name));

/** Every formula and name, to find the nearest one to a misspelt word. */
export const substanceWords = (): string[] => substances.flatMap((s) => [s.formula, ...s.names]);

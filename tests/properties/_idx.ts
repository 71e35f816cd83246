import { readFileSync } from "node:fs";
import { parse } from "csv-parse/sync";
import { substanceIndex } from "../../pipeline/properties/substance-index.ts";
import { liquidDensity } from "../../pipeline/properties/liquid-density.ts";
const rd=(f:string)=>parse(readFileSync(`/work/main/datasets/${f}`),{columns:true}) as Record<string,string>[];
const t0=performance.now();
const subs=rd("properties/substances.csv"), forms=rd("properties/solid_forms.csv"), props=rd("properties/property-values.csv");
const t1=performance.now();
const idx=substanceIndex([{origin:"datasets/properties",substances:subs,solidForms:forms,propertyValues:props}]);
console.log(t1-t0, performance.now()-t1);
console.log(idx.faults);
for (const d of ["handbook","demo"]) {
const i2=substanceIndex([{origin:"datasets/properties",substances:subs,solidForms:forms,propertyValues:props},{origin:d,substances:rd(`${d}/substances.csv`),solidForms:rd(`${d}/solid_forms.csv`),propertyValues:[]}]);
console.log(d, i2.faults, i2.substances.length);}
for (const s of idx.substances) if (s.roles.includes("solvent")) { const d20=liquidDensity(s,293.15), d25=liquidDensity(s,298.15), d60=liquidDensity(s,333.15), d5=liquidDensity(s,278.15); const f=(d:any)=>d?d.value.toFixed(2)+'±'+d.standardUncertainty.toFixed(2):'-'; if(!d20||!d60||!d5||s.boilingPointK===undefined) console.log(s.name,f(d5),f(d20),f(d25),f(d60), s.meltingPointK,s.boilingPointK); }
for (const t of ["KNO3","cuso4.5h2o","CuSO4·5H2O","CuSO4 x 5 H2O","blue vitriol","Isopropyl Alcohol","IPA","copper(II) sulfate trihydrate","paracetamol form II","CaSO4.0.5H2O","CaSO4·2H2O","α‐lactose monohydrate","K2CO3.1.5H2O","CoCl2","COCl2","DME","TMS","2 propanol","caffeine monohydrate","NaC2H3O2","KAl(SO4)2·12H2O","butyl paraben","salol","3CdSO4·8H2O"]) { const r=idx.resolve(t); console.log(t,'=>', r?.substance.name, '|', r?.form?.form, r?.form?.molarMass); }
console.log(idx.nearNames("parcetamol"), idx.nearNames("ethanl"), idx.nearNames("2-butanol "), idx.nearNames("sodium sulfat"), idx.nearNames("acetonitril"),idx.nearNames("zzzzz"));
console.log(idx.substances.filter(s=>s.salt==="organic").map(s=>s.name).join(', '));
console.log(idx.substances.filter(s=>!s.electrolyte&&s.roles.includes("solute")).map(s=>s.name).join(', '));

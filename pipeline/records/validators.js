// Written by schemas/generate-types.ts from the schemas: change those, then run `npm run generate`.
export const validateCollectionCard = validate52;
const schema19 = {"$schema":"https://json-schema.org/draft/2020-12/schema","$id":"collection.schema.json","type":"object","properties":{"$schema":{"type":"string"},"format":{"const":1},"name":{"type":"string","pattern":"^[a-z0-9][a-z0-9-]{0,63}$"},"title":{"type":"string"},"steward":{"type":"string"},"settings":{"$ref":"#/$defs/settings"}},"required":["format","name"],"additionalProperties":false,"$defs":{"settings":{"type":"object","additionalProperties":false,"properties":{"temperature_window_K":{"type":"object","properties":{"low":{"type":"number","minimum":0},"high":{"type":"number","minimum":0}},"additionalProperties":false},"grid_step_K":{"type":"number","minimum":0.1},"material_threshold_percent":{"type":"object","properties":{"from_10_mg_per_mL":{"type":"number","exclusiveMinimum":0},"from_1_mg_per_mL":{"type":"number","exclusiveMinimum":0},"from_0_1_mg_per_mL":{"type":"number","exclusiveMinimum":0},"below_0_1_mg_per_mL":{"type":"number","exclusiveMinimum":0},"aqueous_salts":{"type":"number","exclusiveMinimum":0}},"additionalProperties":false},"material_threshold_uncertainties":{"type":"number","minimum":0},"pharmacopoeia_factor":{"type":"number","minimum":1},"single_temperature_threshold_log10":{"type":"number","minimum":0},"false_discovery_rate":{"type":"number","exclusiveMinimum":0,"maximum":0.5},"default_uncertainty_percent":{"type":"object","properties":{"gravimetric":{"type":"number","exclusiveMinimum":0},"titration":{"type":"number","exclusiveMinimum":0},"hplc":{"type":"number","exclusiveMinimum":0},"uv":{"type":"number","exclusiveMinimum":0},"refractive-index":{"type":"number","exclusiveMinimum":0},"isothermal-synthetic":{"type":"number","exclusiveMinimum":0},"clear-point":{"type":"number","exclusiveMinimum":0},"cloud-point":{"type":"number","exclusiveMinimum":0},"kinetic-from-stock":{"type":"number","exclusiveMinimum":0},"unspecified":{"type":"number","exclusiveMinimum":0},"handbook_salts":{"type":"number","exclusiveMinimum":0}},"additionalProperties":false},"gravimetric_uncertainty_g_per_100g":{"type":"number","minimum":0},"uncertainty_floor_percent":{"type":"object","properties":{"below_1_mg_per_mL":{"type":"number","minimum":0},"below_0_1_mg_per_mL":{"type":"number","minimum":0},"below_0_01_mg_per_mL":{"type":"number","minimum":0}},"additionalProperties":false},"reported_uncertainty_floor_percent":{"type":"object","properties":{"general":{"type":"number","minimum":0},"aqueous_salts":{"type":"number","minimum":0}},"additionalProperties":false},"temperature_uncertainty_K":{"type":"object","properties":{"solution":{"type":"number","minimum":0},"bath":{"type":"number","minimum":0},"jacket":{"type":"number","minimum":0},"unspecified":{"type":"number","minimum":0},"clear_point_to_0_3_K_per_min":{"type":"number","minimum":0},"clear_point_to_1_K_per_min":{"type":"number","minimum":0},"clear_point_faster":{"type":"number","minimum":0}},"additionalProperties":false},"jacket_uncertainty_per_K_from_room":{"type":"number","minimum":0},"room_temperature_K":{"type":"object","properties":{"low":{"type":"number","minimum":0},"high":{"type":"number","minimum":0}},"additionalProperties":false},"between_laboratory_percent":{"type":"object","properties":{"general":{"type":"number","minimum":0},"aqueous_salts":{"type":"number","minimum":0}},"additionalProperties":false},"composition_uncertainty_wt_percent":{"type":"object","properties":{"by_mass":{"type":"number","minimum":0},"by_volume":{"type":"number","minimum":0},"plain_ethanol_water":{"type":"number","minimum":0}},"additionalProperties":false},"fit_weighting":{"enum":["relative","absolute"]},"planning_excess_solvent_percent":{"type":"number","minimum":0},"carry":{"type":"array","items":{"type":"string","pattern":"\\S"},"uniqueItems":true}}}}};
const pattern3 = new RegExp("^[a-z0-9][a-z0-9-]{0,63}$", "u");
const schema20 = {"type":"object","additionalProperties":false,"properties":{"temperature_window_K":{"type":"object","properties":{"low":{"type":"number","minimum":0},"high":{"type":"number","minimum":0}},"additionalProperties":false},"grid_step_K":{"type":"number","minimum":0.1},"material_threshold_percent":{"type":"object","properties":{"from_10_mg_per_mL":{"type":"number","exclusiveMinimum":0},"from_1_mg_per_mL":{"type":"number","exclusiveMinimum":0},"from_0_1_mg_per_mL":{"type":"number","exclusiveMinimum":0},"below_0_1_mg_per_mL":{"type":"number","exclusiveMinimum":0},"aqueous_salts":{"type":"number","exclusiveMinimum":0}},"additionalProperties":false},"material_threshold_uncertainties":{"type":"number","minimum":0},"pharmacopoeia_factor":{"type":"number","minimum":1},"single_temperature_threshold_log10":{"type":"number","minimum":0},"false_discovery_rate":{"type":"number","exclusiveMinimum":0,"maximum":0.5},"default_uncertainty_percent":{"type":"object","properties":{"gravimetric":{"type":"number","exclusiveMinimum":0},"titration":{"type":"number","exclusiveMinimum":0},"hplc":{"type":"number","exclusiveMinimum":0},"uv":{"type":"number","exclusiveMinimum":0},"refractive-index":{"type":"number","exclusiveMinimum":0},"isothermal-synthetic":{"type":"number","exclusiveMinimum":0},"clear-point":{"type":"number","exclusiveMinimum":0},"cloud-point":{"type":"number","exclusiveMinimum":0},"kinetic-from-stock":{"type":"number","exclusiveMinimum":0},"unspecified":{"type":"number","exclusiveMinimum":0},"handbook_salts":{"type":"number","exclusiveMinimum":0}},"additionalProperties":false},"gravimetric_uncertainty_g_per_100g":{"type":"number","minimum":0},"uncertainty_floor_percent":{"type":"object","properties":{"below_1_mg_per_mL":{"type":"number","minimum":0},"below_0_1_mg_per_mL":{"type":"number","minimum":0},"below_0_01_mg_per_mL":{"type":"number","minimum":0}},"additionalProperties":false},"reported_uncertainty_floor_percent":{"type":"object","properties":{"general":{"type":"number","minimum":0},"aqueous_salts":{"type":"number","minimum":0}},"additionalProperties":false},"temperature_uncertainty_K":{"type":"object","properties":{"solution":{"type":"number","minimum":0},"bath":{"type":"number","minimum":0},"jacket":{"type":"number","minimum":0},"unspecified":{"type":"number","minimum":0},"clear_point_to_0_3_K_per_min":{"type":"number","minimum":0},"clear_point_to_1_K_per_min":{"type":"number","minimum":0},"clear_point_faster":{"type":"number","minimum":0}},"additionalProperties":false},"jacket_uncertainty_per_K_from_room":{"type":"number","minimum":0},"room_temperature_K":{"type":"object","properties":{"low":{"type":"number","minimum":0},"high":{"type":"number","minimum":0}},"additionalProperties":false},"between_laboratory_percent":{"type":"object","properties":{"general":{"type":"number","minimum":0},"aqueous_salts":{"type":"number","minimum":0}},"additionalProperties":false},"composition_uncertainty_wt_percent":{"type":"object","properties":{"by_mass":{"type":"number","minimum":0},"by_volume":{"type":"number","minimum":0},"plain_ethanol_water":{"type":"number","minimum":0}},"additionalProperties":false},"fit_weighting":{"enum":["relative","absolute"]},"planning_excess_solvent_percent":{"type":"number","minimum":0},"carry":{"type":"array","items":{"type":"string","pattern":"\\S"},"uniqueItems":true}}};
const func1 = Object.prototype.hasOwnProperty;
const pattern4 = new RegExp("\\S", "u");

function validate53(data, {instancePath="", parentData, parentDataProperty, rootData=data, dynamicAnchors={}}={}){
let vErrors = null;
let errors = 0;
const evaluated0 = validate53.evaluated;
if(evaluated0.dynamicProps){
evaluated0.props = undefined;
}
if(evaluated0.dynamicItems){
evaluated0.items = undefined;
}
if(data && typeof data == "object" && !Array.isArray(data)){
for(const key0 in data){
if(!(func1.call(schema20.properties, key0))){
const err0 = {instancePath,schemaPath:"#/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key0},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err0];
}
else {
vErrors.push(err0);
}
errors++;
}
}
if(data.temperature_window_K !== undefined){
let data0 = data.temperature_window_K;
if(data0 && typeof data0 == "object" && !Array.isArray(data0)){
for(const key1 in data0){
if(!((key1 === "low") || (key1 === "high"))){
const err1 = {instancePath:instancePath+"/temperature_window_K",schemaPath:"#/properties/temperature_window_K/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key1},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err1];
}
else {
vErrors.push(err1);
}
errors++;
}
}
if(data0.low !== undefined){
let data1 = data0.low;
if((typeof data1 == "number") && (isFinite(data1))){
if(data1 < 0 || isNaN(data1)){
const err2 = {instancePath:instancePath+"/temperature_window_K/low",schemaPath:"#/properties/temperature_window_K/properties/low/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err2];
}
else {
vErrors.push(err2);
}
errors++;
}
}
else {
const err3 = {instancePath:instancePath+"/temperature_window_K/low",schemaPath:"#/properties/temperature_window_K/properties/low/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err3];
}
else {
vErrors.push(err3);
}
errors++;
}
}
if(data0.high !== undefined){
let data2 = data0.high;
if((typeof data2 == "number") && (isFinite(data2))){
if(data2 < 0 || isNaN(data2)){
const err4 = {instancePath:instancePath+"/temperature_window_K/high",schemaPath:"#/properties/temperature_window_K/properties/high/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err4];
}
else {
vErrors.push(err4);
}
errors++;
}
}
else {
const err5 = {instancePath:instancePath+"/temperature_window_K/high",schemaPath:"#/properties/temperature_window_K/properties/high/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err5];
}
else {
vErrors.push(err5);
}
errors++;
}
}
}
else {
const err6 = {instancePath:instancePath+"/temperature_window_K",schemaPath:"#/properties/temperature_window_K/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err6];
}
else {
vErrors.push(err6);
}
errors++;
}
}
if(data.grid_step_K !== undefined){
let data3 = data.grid_step_K;
if((typeof data3 == "number") && (isFinite(data3))){
if(data3 < 0.1 || isNaN(data3)){
const err7 = {instancePath:instancePath+"/grid_step_K",schemaPath:"#/properties/grid_step_K/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0.1},message:"must be >= 0.1"};
if(vErrors === null){
vErrors = [err7];
}
else {
vErrors.push(err7);
}
errors++;
}
}
else {
const err8 = {instancePath:instancePath+"/grid_step_K",schemaPath:"#/properties/grid_step_K/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err8];
}
else {
vErrors.push(err8);
}
errors++;
}
}
if(data.material_threshold_percent !== undefined){
let data4 = data.material_threshold_percent;
if(data4 && typeof data4 == "object" && !Array.isArray(data4)){
for(const key2 in data4){
if(!(((((key2 === "from_10_mg_per_mL") || (key2 === "from_1_mg_per_mL")) || (key2 === "from_0_1_mg_per_mL")) || (key2 === "below_0_1_mg_per_mL")) || (key2 === "aqueous_salts"))){
const err9 = {instancePath:instancePath+"/material_threshold_percent",schemaPath:"#/properties/material_threshold_percent/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key2},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err9];
}
else {
vErrors.push(err9);
}
errors++;
}
}
if(data4.from_10_mg_per_mL !== undefined){
let data5 = data4.from_10_mg_per_mL;
if((typeof data5 == "number") && (isFinite(data5))){
if(data5 <= 0 || isNaN(data5)){
const err10 = {instancePath:instancePath+"/material_threshold_percent/from_10_mg_per_mL",schemaPath:"#/properties/material_threshold_percent/properties/from_10_mg_per_mL/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err10];
}
else {
vErrors.push(err10);
}
errors++;
}
}
else {
const err11 = {instancePath:instancePath+"/material_threshold_percent/from_10_mg_per_mL",schemaPath:"#/properties/material_threshold_percent/properties/from_10_mg_per_mL/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err11];
}
else {
vErrors.push(err11);
}
errors++;
}
}
if(data4.from_1_mg_per_mL !== undefined){
let data6 = data4.from_1_mg_per_mL;
if((typeof data6 == "number") && (isFinite(data6))){
if(data6 <= 0 || isNaN(data6)){
const err12 = {instancePath:instancePath+"/material_threshold_percent/from_1_mg_per_mL",schemaPath:"#/properties/material_threshold_percent/properties/from_1_mg_per_mL/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err12];
}
else {
vErrors.push(err12);
}
errors++;
}
}
else {
const err13 = {instancePath:instancePath+"/material_threshold_percent/from_1_mg_per_mL",schemaPath:"#/properties/material_threshold_percent/properties/from_1_mg_per_mL/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err13];
}
else {
vErrors.push(err13);
}
errors++;
}
}
if(data4.from_0_1_mg_per_mL !== undefined){
let data7 = data4.from_0_1_mg_per_mL;
if((typeof data7 == "number") && (isFinite(data7))){
if(data7 <= 0 || isNaN(data7)){
const err14 = {instancePath:instancePath+"/material_threshold_percent/from_0_1_mg_per_mL",schemaPath:"#/properties/material_threshold_percent/properties/from_0_1_mg_per_mL/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err14];
}
else {
vErrors.push(err14);
}
errors++;
}
}
else {
const err15 = {instancePath:instancePath+"/material_threshold_percent/from_0_1_mg_per_mL",schemaPath:"#/properties/material_threshold_percent/properties/from_0_1_mg_per_mL/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err15];
}
else {
vErrors.push(err15);
}
errors++;
}
}
if(data4.below_0_1_mg_per_mL !== undefined){
let data8 = data4.below_0_1_mg_per_mL;
if((typeof data8 == "number") && (isFinite(data8))){
if(data8 <= 0 || isNaN(data8)){
const err16 = {instancePath:instancePath+"/material_threshold_percent/below_0_1_mg_per_mL",schemaPath:"#/properties/material_threshold_percent/properties/below_0_1_mg_per_mL/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err16];
}
else {
vErrors.push(err16);
}
errors++;
}
}
else {
const err17 = {instancePath:instancePath+"/material_threshold_percent/below_0_1_mg_per_mL",schemaPath:"#/properties/material_threshold_percent/properties/below_0_1_mg_per_mL/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err17];
}
else {
vErrors.push(err17);
}
errors++;
}
}
if(data4.aqueous_salts !== undefined){
let data9 = data4.aqueous_salts;
if((typeof data9 == "number") && (isFinite(data9))){
if(data9 <= 0 || isNaN(data9)){
const err18 = {instancePath:instancePath+"/material_threshold_percent/aqueous_salts",schemaPath:"#/properties/material_threshold_percent/properties/aqueous_salts/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err18];
}
else {
vErrors.push(err18);
}
errors++;
}
}
else {
const err19 = {instancePath:instancePath+"/material_threshold_percent/aqueous_salts",schemaPath:"#/properties/material_threshold_percent/properties/aqueous_salts/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err19];
}
else {
vErrors.push(err19);
}
errors++;
}
}
}
else {
const err20 = {instancePath:instancePath+"/material_threshold_percent",schemaPath:"#/properties/material_threshold_percent/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err20];
}
else {
vErrors.push(err20);
}
errors++;
}
}
if(data.material_threshold_uncertainties !== undefined){
let data10 = data.material_threshold_uncertainties;
if((typeof data10 == "number") && (isFinite(data10))){
if(data10 < 0 || isNaN(data10)){
const err21 = {instancePath:instancePath+"/material_threshold_uncertainties",schemaPath:"#/properties/material_threshold_uncertainties/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err21];
}
else {
vErrors.push(err21);
}
errors++;
}
}
else {
const err22 = {instancePath:instancePath+"/material_threshold_uncertainties",schemaPath:"#/properties/material_threshold_uncertainties/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err22];
}
else {
vErrors.push(err22);
}
errors++;
}
}
if(data.pharmacopoeia_factor !== undefined){
let data11 = data.pharmacopoeia_factor;
if((typeof data11 == "number") && (isFinite(data11))){
if(data11 < 1 || isNaN(data11)){
const err23 = {instancePath:instancePath+"/pharmacopoeia_factor",schemaPath:"#/properties/pharmacopoeia_factor/minimum",keyword:"minimum",params:{comparison: ">=", limit: 1},message:"must be >= 1"};
if(vErrors === null){
vErrors = [err23];
}
else {
vErrors.push(err23);
}
errors++;
}
}
else {
const err24 = {instancePath:instancePath+"/pharmacopoeia_factor",schemaPath:"#/properties/pharmacopoeia_factor/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err24];
}
else {
vErrors.push(err24);
}
errors++;
}
}
if(data.single_temperature_threshold_log10 !== undefined){
let data12 = data.single_temperature_threshold_log10;
if((typeof data12 == "number") && (isFinite(data12))){
if(data12 < 0 || isNaN(data12)){
const err25 = {instancePath:instancePath+"/single_temperature_threshold_log10",schemaPath:"#/properties/single_temperature_threshold_log10/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err25];
}
else {
vErrors.push(err25);
}
errors++;
}
}
else {
const err26 = {instancePath:instancePath+"/single_temperature_threshold_log10",schemaPath:"#/properties/single_temperature_threshold_log10/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err26];
}
else {
vErrors.push(err26);
}
errors++;
}
}
if(data.false_discovery_rate !== undefined){
let data13 = data.false_discovery_rate;
if((typeof data13 == "number") && (isFinite(data13))){
if(data13 > 0.5 || isNaN(data13)){
const err27 = {instancePath:instancePath+"/false_discovery_rate",schemaPath:"#/properties/false_discovery_rate/maximum",keyword:"maximum",params:{comparison: "<=", limit: 0.5},message:"must be <= 0.5"};
if(vErrors === null){
vErrors = [err27];
}
else {
vErrors.push(err27);
}
errors++;
}
if(data13 <= 0 || isNaN(data13)){
const err28 = {instancePath:instancePath+"/false_discovery_rate",schemaPath:"#/properties/false_discovery_rate/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err28];
}
else {
vErrors.push(err28);
}
errors++;
}
}
else {
const err29 = {instancePath:instancePath+"/false_discovery_rate",schemaPath:"#/properties/false_discovery_rate/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err29];
}
else {
vErrors.push(err29);
}
errors++;
}
}
if(data.default_uncertainty_percent !== undefined){
let data14 = data.default_uncertainty_percent;
if(data14 && typeof data14 == "object" && !Array.isArray(data14)){
for(const key3 in data14){
if(!(func1.call(schema20.properties.default_uncertainty_percent.properties, key3))){
const err30 = {instancePath:instancePath+"/default_uncertainty_percent",schemaPath:"#/properties/default_uncertainty_percent/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key3},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err30];
}
else {
vErrors.push(err30);
}
errors++;
}
}
if(data14.gravimetric !== undefined){
let data15 = data14.gravimetric;
if((typeof data15 == "number") && (isFinite(data15))){
if(data15 <= 0 || isNaN(data15)){
const err31 = {instancePath:instancePath+"/default_uncertainty_percent/gravimetric",schemaPath:"#/properties/default_uncertainty_percent/properties/gravimetric/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err31];
}
else {
vErrors.push(err31);
}
errors++;
}
}
else {
const err32 = {instancePath:instancePath+"/default_uncertainty_percent/gravimetric",schemaPath:"#/properties/default_uncertainty_percent/properties/gravimetric/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err32];
}
else {
vErrors.push(err32);
}
errors++;
}
}
if(data14.titration !== undefined){
let data16 = data14.titration;
if((typeof data16 == "number") && (isFinite(data16))){
if(data16 <= 0 || isNaN(data16)){
const err33 = {instancePath:instancePath+"/default_uncertainty_percent/titration",schemaPath:"#/properties/default_uncertainty_percent/properties/titration/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err33];
}
else {
vErrors.push(err33);
}
errors++;
}
}
else {
const err34 = {instancePath:instancePath+"/default_uncertainty_percent/titration",schemaPath:"#/properties/default_uncertainty_percent/properties/titration/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err34];
}
else {
vErrors.push(err34);
}
errors++;
}
}
if(data14.hplc !== undefined){
let data17 = data14.hplc;
if((typeof data17 == "number") && (isFinite(data17))){
if(data17 <= 0 || isNaN(data17)){
const err35 = {instancePath:instancePath+"/default_uncertainty_percent/hplc",schemaPath:"#/properties/default_uncertainty_percent/properties/hplc/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err35];
}
else {
vErrors.push(err35);
}
errors++;
}
}
else {
const err36 = {instancePath:instancePath+"/default_uncertainty_percent/hplc",schemaPath:"#/properties/default_uncertainty_percent/properties/hplc/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err36];
}
else {
vErrors.push(err36);
}
errors++;
}
}
if(data14.uv !== undefined){
let data18 = data14.uv;
if((typeof data18 == "number") && (isFinite(data18))){
if(data18 <= 0 || isNaN(data18)){
const err37 = {instancePath:instancePath+"/default_uncertainty_percent/uv",schemaPath:"#/properties/default_uncertainty_percent/properties/uv/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err37];
}
else {
vErrors.push(err37);
}
errors++;
}
}
else {
const err38 = {instancePath:instancePath+"/default_uncertainty_percent/uv",schemaPath:"#/properties/default_uncertainty_percent/properties/uv/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err38];
}
else {
vErrors.push(err38);
}
errors++;
}
}
if(data14["refractive-index"] !== undefined){
let data19 = data14["refractive-index"];
if((typeof data19 == "number") && (isFinite(data19))){
if(data19 <= 0 || isNaN(data19)){
const err39 = {instancePath:instancePath+"/default_uncertainty_percent/refractive-index",schemaPath:"#/properties/default_uncertainty_percent/properties/refractive-index/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err39];
}
else {
vErrors.push(err39);
}
errors++;
}
}
else {
const err40 = {instancePath:instancePath+"/default_uncertainty_percent/refractive-index",schemaPath:"#/properties/default_uncertainty_percent/properties/refractive-index/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err40];
}
else {
vErrors.push(err40);
}
errors++;
}
}
if(data14["isothermal-synthetic"] !== undefined){
let data20 = data14["isothermal-synthetic"];
if((typeof data20 == "number") && (isFinite(data20))){
if(data20 <= 0 || isNaN(data20)){
const err41 = {instancePath:instancePath+"/default_uncertainty_percent/isothermal-synthetic",schemaPath:"#/properties/default_uncertainty_percent/properties/isothermal-synthetic/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err41];
}
else {
vErrors.push(err41);
}
errors++;
}
}
else {
const err42 = {instancePath:instancePath+"/default_uncertainty_percent/isothermal-synthetic",schemaPath:"#/properties/default_uncertainty_percent/properties/isothermal-synthetic/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err42];
}
else {
vErrors.push(err42);
}
errors++;
}
}
if(data14["clear-point"] !== undefined){
let data21 = data14["clear-point"];
if((typeof data21 == "number") && (isFinite(data21))){
if(data21 <= 0 || isNaN(data21)){
const err43 = {instancePath:instancePath+"/default_uncertainty_percent/clear-point",schemaPath:"#/properties/default_uncertainty_percent/properties/clear-point/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err43];
}
else {
vErrors.push(err43);
}
errors++;
}
}
else {
const err44 = {instancePath:instancePath+"/default_uncertainty_percent/clear-point",schemaPath:"#/properties/default_uncertainty_percent/properties/clear-point/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err44];
}
else {
vErrors.push(err44);
}
errors++;
}
}
if(data14["cloud-point"] !== undefined){
let data22 = data14["cloud-point"];
if((typeof data22 == "number") && (isFinite(data22))){
if(data22 <= 0 || isNaN(data22)){
const err45 = {instancePath:instancePath+"/default_uncertainty_percent/cloud-point",schemaPath:"#/properties/default_uncertainty_percent/properties/cloud-point/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err45];
}
else {
vErrors.push(err45);
}
errors++;
}
}
else {
const err46 = {instancePath:instancePath+"/default_uncertainty_percent/cloud-point",schemaPath:"#/properties/default_uncertainty_percent/properties/cloud-point/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err46];
}
else {
vErrors.push(err46);
}
errors++;
}
}
if(data14["kinetic-from-stock"] !== undefined){
let data23 = data14["kinetic-from-stock"];
if((typeof data23 == "number") && (isFinite(data23))){
if(data23 <= 0 || isNaN(data23)){
const err47 = {instancePath:instancePath+"/default_uncertainty_percent/kinetic-from-stock",schemaPath:"#/properties/default_uncertainty_percent/properties/kinetic-from-stock/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err47];
}
else {
vErrors.push(err47);
}
errors++;
}
}
else {
const err48 = {instancePath:instancePath+"/default_uncertainty_percent/kinetic-from-stock",schemaPath:"#/properties/default_uncertainty_percent/properties/kinetic-from-stock/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err48];
}
else {
vErrors.push(err48);
}
errors++;
}
}
if(data14.unspecified !== undefined){
let data24 = data14.unspecified;
if((typeof data24 == "number") && (isFinite(data24))){
if(data24 <= 0 || isNaN(data24)){
const err49 = {instancePath:instancePath+"/default_uncertainty_percent/unspecified",schemaPath:"#/properties/default_uncertainty_percent/properties/unspecified/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err49];
}
else {
vErrors.push(err49);
}
errors++;
}
}
else {
const err50 = {instancePath:instancePath+"/default_uncertainty_percent/unspecified",schemaPath:"#/properties/default_uncertainty_percent/properties/unspecified/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err50];
}
else {
vErrors.push(err50);
}
errors++;
}
}
if(data14.handbook_salts !== undefined){
let data25 = data14.handbook_salts;
if((typeof data25 == "number") && (isFinite(data25))){
if(data25 <= 0 || isNaN(data25)){
const err51 = {instancePath:instancePath+"/default_uncertainty_percent/handbook_salts",schemaPath:"#/properties/default_uncertainty_percent/properties/handbook_salts/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err51];
}
else {
vErrors.push(err51);
}
errors++;
}
}
else {
const err52 = {instancePath:instancePath+"/default_uncertainty_percent/handbook_salts",schemaPath:"#/properties/default_uncertainty_percent/properties/handbook_salts/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err52];
}
else {
vErrors.push(err52);
}
errors++;
}
}
}
else {
const err53 = {instancePath:instancePath+"/default_uncertainty_percent",schemaPath:"#/properties/default_uncertainty_percent/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err53];
}
else {
vErrors.push(err53);
}
errors++;
}
}
if(data.gravimetric_uncertainty_g_per_100g !== undefined){
let data26 = data.gravimetric_uncertainty_g_per_100g;
if((typeof data26 == "number") && (isFinite(data26))){
if(data26 < 0 || isNaN(data26)){
const err54 = {instancePath:instancePath+"/gravimetric_uncertainty_g_per_100g",schemaPath:"#/properties/gravimetric_uncertainty_g_per_100g/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err54];
}
else {
vErrors.push(err54);
}
errors++;
}
}
else {
const err55 = {instancePath:instancePath+"/gravimetric_uncertainty_g_per_100g",schemaPath:"#/properties/gravimetric_uncertainty_g_per_100g/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err55];
}
else {
vErrors.push(err55);
}
errors++;
}
}
if(data.uncertainty_floor_percent !== undefined){
let data27 = data.uncertainty_floor_percent;
if(data27 && typeof data27 == "object" && !Array.isArray(data27)){
for(const key4 in data27){
if(!(((key4 === "below_1_mg_per_mL") || (key4 === "below_0_1_mg_per_mL")) || (key4 === "below_0_01_mg_per_mL"))){
const err56 = {instancePath:instancePath+"/uncertainty_floor_percent",schemaPath:"#/properties/uncertainty_floor_percent/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key4},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err56];
}
else {
vErrors.push(err56);
}
errors++;
}
}
if(data27.below_1_mg_per_mL !== undefined){
let data28 = data27.below_1_mg_per_mL;
if((typeof data28 == "number") && (isFinite(data28))){
if(data28 < 0 || isNaN(data28)){
const err57 = {instancePath:instancePath+"/uncertainty_floor_percent/below_1_mg_per_mL",schemaPath:"#/properties/uncertainty_floor_percent/properties/below_1_mg_per_mL/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err57];
}
else {
vErrors.push(err57);
}
errors++;
}
}
else {
const err58 = {instancePath:instancePath+"/uncertainty_floor_percent/below_1_mg_per_mL",schemaPath:"#/properties/uncertainty_floor_percent/properties/below_1_mg_per_mL/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err58];
}
else {
vErrors.push(err58);
}
errors++;
}
}
if(data27.below_0_1_mg_per_mL !== undefined){
let data29 = data27.below_0_1_mg_per_mL;
if((typeof data29 == "number") && (isFinite(data29))){
if(data29 < 0 || isNaN(data29)){
const err59 = {instancePath:instancePath+"/uncertainty_floor_percent/below_0_1_mg_per_mL",schemaPath:"#/properties/uncertainty_floor_percent/properties/below_0_1_mg_per_mL/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err59];
}
else {
vErrors.push(err59);
}
errors++;
}
}
else {
const err60 = {instancePath:instancePath+"/uncertainty_floor_percent/below_0_1_mg_per_mL",schemaPath:"#/properties/uncertainty_floor_percent/properties/below_0_1_mg_per_mL/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err60];
}
else {
vErrors.push(err60);
}
errors++;
}
}
if(data27.below_0_01_mg_per_mL !== undefined){
let data30 = data27.below_0_01_mg_per_mL;
if((typeof data30 == "number") && (isFinite(data30))){
if(data30 < 0 || isNaN(data30)){
const err61 = {instancePath:instancePath+"/uncertainty_floor_percent/below_0_01_mg_per_mL",schemaPath:"#/properties/uncertainty_floor_percent/properties/below_0_01_mg_per_mL/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err61];
}
else {
vErrors.push(err61);
}
errors++;
}
}
else {
const err62 = {instancePath:instancePath+"/uncertainty_floor_percent/below_0_01_mg_per_mL",schemaPath:"#/properties/uncertainty_floor_percent/properties/below_0_01_mg_per_mL/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err62];
}
else {
vErrors.push(err62);
}
errors++;
}
}
}
else {
const err63 = {instancePath:instancePath+"/uncertainty_floor_percent",schemaPath:"#/properties/uncertainty_floor_percent/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err63];
}
else {
vErrors.push(err63);
}
errors++;
}
}
if(data.reported_uncertainty_floor_percent !== undefined){
let data31 = data.reported_uncertainty_floor_percent;
if(data31 && typeof data31 == "object" && !Array.isArray(data31)){
for(const key5 in data31){
if(!((key5 === "general") || (key5 === "aqueous_salts"))){
const err64 = {instancePath:instancePath+"/reported_uncertainty_floor_percent",schemaPath:"#/properties/reported_uncertainty_floor_percent/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key5},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err64];
}
else {
vErrors.push(err64);
}
errors++;
}
}
if(data31.general !== undefined){
let data32 = data31.general;
if((typeof data32 == "number") && (isFinite(data32))){
if(data32 < 0 || isNaN(data32)){
const err65 = {instancePath:instancePath+"/reported_uncertainty_floor_percent/general",schemaPath:"#/properties/reported_uncertainty_floor_percent/properties/general/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err65];
}
else {
vErrors.push(err65);
}
errors++;
}
}
else {
const err66 = {instancePath:instancePath+"/reported_uncertainty_floor_percent/general",schemaPath:"#/properties/reported_uncertainty_floor_percent/properties/general/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err66];
}
else {
vErrors.push(err66);
}
errors++;
}
}
if(data31.aqueous_salts !== undefined){
let data33 = data31.aqueous_salts;
if((typeof data33 == "number") && (isFinite(data33))){
if(data33 < 0 || isNaN(data33)){
const err67 = {instancePath:instancePath+"/reported_uncertainty_floor_percent/aqueous_salts",schemaPath:"#/properties/reported_uncertainty_floor_percent/properties/aqueous_salts/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err67];
}
else {
vErrors.push(err67);
}
errors++;
}
}
else {
const err68 = {instancePath:instancePath+"/reported_uncertainty_floor_percent/aqueous_salts",schemaPath:"#/properties/reported_uncertainty_floor_percent/properties/aqueous_salts/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err68];
}
else {
vErrors.push(err68);
}
errors++;
}
}
}
else {
const err69 = {instancePath:instancePath+"/reported_uncertainty_floor_percent",schemaPath:"#/properties/reported_uncertainty_floor_percent/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err69];
}
else {
vErrors.push(err69);
}
errors++;
}
}
if(data.temperature_uncertainty_K !== undefined){
let data34 = data.temperature_uncertainty_K;
if(data34 && typeof data34 == "object" && !Array.isArray(data34)){
for(const key6 in data34){
if(!(((((((key6 === "solution") || (key6 === "bath")) || (key6 === "jacket")) || (key6 === "unspecified")) || (key6 === "clear_point_to_0_3_K_per_min")) || (key6 === "clear_point_to_1_K_per_min")) || (key6 === "clear_point_faster"))){
const err70 = {instancePath:instancePath+"/temperature_uncertainty_K",schemaPath:"#/properties/temperature_uncertainty_K/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key6},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err70];
}
else {
vErrors.push(err70);
}
errors++;
}
}
if(data34.solution !== undefined){
let data35 = data34.solution;
if((typeof data35 == "number") && (isFinite(data35))){
if(data35 < 0 || isNaN(data35)){
const err71 = {instancePath:instancePath+"/temperature_uncertainty_K/solution",schemaPath:"#/properties/temperature_uncertainty_K/properties/solution/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err71];
}
else {
vErrors.push(err71);
}
errors++;
}
}
else {
const err72 = {instancePath:instancePath+"/temperature_uncertainty_K/solution",schemaPath:"#/properties/temperature_uncertainty_K/properties/solution/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err72];
}
else {
vErrors.push(err72);
}
errors++;
}
}
if(data34.bath !== undefined){
let data36 = data34.bath;
if((typeof data36 == "number") && (isFinite(data36))){
if(data36 < 0 || isNaN(data36)){
const err73 = {instancePath:instancePath+"/temperature_uncertainty_K/bath",schemaPath:"#/properties/temperature_uncertainty_K/properties/bath/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err73];
}
else {
vErrors.push(err73);
}
errors++;
}
}
else {
const err74 = {instancePath:instancePath+"/temperature_uncertainty_K/bath",schemaPath:"#/properties/temperature_uncertainty_K/properties/bath/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err74];
}
else {
vErrors.push(err74);
}
errors++;
}
}
if(data34.jacket !== undefined){
let data37 = data34.jacket;
if((typeof data37 == "number") && (isFinite(data37))){
if(data37 < 0 || isNaN(data37)){
const err75 = {instancePath:instancePath+"/temperature_uncertainty_K/jacket",schemaPath:"#/properties/temperature_uncertainty_K/properties/jacket/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err75];
}
else {
vErrors.push(err75);
}
errors++;
}
}
else {
const err76 = {instancePath:instancePath+"/temperature_uncertainty_K/jacket",schemaPath:"#/properties/temperature_uncertainty_K/properties/jacket/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err76];
}
else {
vErrors.push(err76);
}
errors++;
}
}
if(data34.unspecified !== undefined){
let data38 = data34.unspecified;
if((typeof data38 == "number") && (isFinite(data38))){
if(data38 < 0 || isNaN(data38)){
const err77 = {instancePath:instancePath+"/temperature_uncertainty_K/unspecified",schemaPath:"#/properties/temperature_uncertainty_K/properties/unspecified/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err77];
}
else {
vErrors.push(err77);
}
errors++;
}
}
else {
const err78 = {instancePath:instancePath+"/temperature_uncertainty_K/unspecified",schemaPath:"#/properties/temperature_uncertainty_K/properties/unspecified/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err78];
}
else {
vErrors.push(err78);
}
errors++;
}
}
if(data34.clear_point_to_0_3_K_per_min !== undefined){
let data39 = data34.clear_point_to_0_3_K_per_min;
if((typeof data39 == "number") && (isFinite(data39))){
if(data39 < 0 || isNaN(data39)){
const err79 = {instancePath:instancePath+"/temperature_uncertainty_K/clear_point_to_0_3_K_per_min",schemaPath:"#/properties/temperature_uncertainty_K/properties/clear_point_to_0_3_K_per_min/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err79];
}
else {
vErrors.push(err79);
}
errors++;
}
}
else {
const err80 = {instancePath:instancePath+"/temperature_uncertainty_K/clear_point_to_0_3_K_per_min",schemaPath:"#/properties/temperature_uncertainty_K/properties/clear_point_to_0_3_K_per_min/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err80];
}
else {
vErrors.push(err80);
}
errors++;
}
}
if(data34.clear_point_to_1_K_per_min !== undefined){
let data40 = data34.clear_point_to_1_K_per_min;
if((typeof data40 == "number") && (isFinite(data40))){
if(data40 < 0 || isNaN(data40)){
const err81 = {instancePath:instancePath+"/temperature_uncertainty_K/clear_point_to_1_K_per_min",schemaPath:"#/properties/temperature_uncertainty_K/properties/clear_point_to_1_K_per_min/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err81];
}
else {
vErrors.push(err81);
}
errors++;
}
}
else {
const err82 = {instancePath:instancePath+"/temperature_uncertainty_K/clear_point_to_1_K_per_min",schemaPath:"#/properties/temperature_uncertainty_K/properties/clear_point_to_1_K_per_min/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err82];
}
else {
vErrors.push(err82);
}
errors++;
}
}
if(data34.clear_point_faster !== undefined){
let data41 = data34.clear_point_faster;
if((typeof data41 == "number") && (isFinite(data41))){
if(data41 < 0 || isNaN(data41)){
const err83 = {instancePath:instancePath+"/temperature_uncertainty_K/clear_point_faster",schemaPath:"#/properties/temperature_uncertainty_K/properties/clear_point_faster/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err83];
}
else {
vErrors.push(err83);
}
errors++;
}
}
else {
const err84 = {instancePath:instancePath+"/temperature_uncertainty_K/clear_point_faster",schemaPath:"#/properties/temperature_uncertainty_K/properties/clear_point_faster/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err84];
}
else {
vErrors.push(err84);
}
errors++;
}
}
}
else {
const err85 = {instancePath:instancePath+"/temperature_uncertainty_K",schemaPath:"#/properties/temperature_uncertainty_K/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err85];
}
else {
vErrors.push(err85);
}
errors++;
}
}
if(data.jacket_uncertainty_per_K_from_room !== undefined){
let data42 = data.jacket_uncertainty_per_K_from_room;
if((typeof data42 == "number") && (isFinite(data42))){
if(data42 < 0 || isNaN(data42)){
const err86 = {instancePath:instancePath+"/jacket_uncertainty_per_K_from_room",schemaPath:"#/properties/jacket_uncertainty_per_K_from_room/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err86];
}
else {
vErrors.push(err86);
}
errors++;
}
}
else {
const err87 = {instancePath:instancePath+"/jacket_uncertainty_per_K_from_room",schemaPath:"#/properties/jacket_uncertainty_per_K_from_room/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err87];
}
else {
vErrors.push(err87);
}
errors++;
}
}
if(data.room_temperature_K !== undefined){
let data43 = data.room_temperature_K;
if(data43 && typeof data43 == "object" && !Array.isArray(data43)){
for(const key7 in data43){
if(!((key7 === "low") || (key7 === "high"))){
const err88 = {instancePath:instancePath+"/room_temperature_K",schemaPath:"#/properties/room_temperature_K/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key7},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err88];
}
else {
vErrors.push(err88);
}
errors++;
}
}
if(data43.low !== undefined){
let data44 = data43.low;
if((typeof data44 == "number") && (isFinite(data44))){
if(data44 < 0 || isNaN(data44)){
const err89 = {instancePath:instancePath+"/room_temperature_K/low",schemaPath:"#/properties/room_temperature_K/properties/low/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err89];
}
else {
vErrors.push(err89);
}
errors++;
}
}
else {
const err90 = {instancePath:instancePath+"/room_temperature_K/low",schemaPath:"#/properties/room_temperature_K/properties/low/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err90];
}
else {
vErrors.push(err90);
}
errors++;
}
}
if(data43.high !== undefined){
let data45 = data43.high;
if((typeof data45 == "number") && (isFinite(data45))){
if(data45 < 0 || isNaN(data45)){
const err91 = {instancePath:instancePath+"/room_temperature_K/high",schemaPath:"#/properties/room_temperature_K/properties/high/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err91];
}
else {
vErrors.push(err91);
}
errors++;
}
}
else {
const err92 = {instancePath:instancePath+"/room_temperature_K/high",schemaPath:"#/properties/room_temperature_K/properties/high/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err92];
}
else {
vErrors.push(err92);
}
errors++;
}
}
}
else {
const err93 = {instancePath:instancePath+"/room_temperature_K",schemaPath:"#/properties/room_temperature_K/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err93];
}
else {
vErrors.push(err93);
}
errors++;
}
}
if(data.between_laboratory_percent !== undefined){
let data46 = data.between_laboratory_percent;
if(data46 && typeof data46 == "object" && !Array.isArray(data46)){
for(const key8 in data46){
if(!((key8 === "general") || (key8 === "aqueous_salts"))){
const err94 = {instancePath:instancePath+"/between_laboratory_percent",schemaPath:"#/properties/between_laboratory_percent/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key8},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err94];
}
else {
vErrors.push(err94);
}
errors++;
}
}
if(data46.general !== undefined){
let data47 = data46.general;
if((typeof data47 == "number") && (isFinite(data47))){
if(data47 < 0 || isNaN(data47)){
const err95 = {instancePath:instancePath+"/between_laboratory_percent/general",schemaPath:"#/properties/between_laboratory_percent/properties/general/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err95];
}
else {
vErrors.push(err95);
}
errors++;
}
}
else {
const err96 = {instancePath:instancePath+"/between_laboratory_percent/general",schemaPath:"#/properties/between_laboratory_percent/properties/general/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err96];
}
else {
vErrors.push(err96);
}
errors++;
}
}
if(data46.aqueous_salts !== undefined){
let data48 = data46.aqueous_salts;
if((typeof data48 == "number") && (isFinite(data48))){
if(data48 < 0 || isNaN(data48)){
const err97 = {instancePath:instancePath+"/between_laboratory_percent/aqueous_salts",schemaPath:"#/properties/between_laboratory_percent/properties/aqueous_salts/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err97];
}
else {
vErrors.push(err97);
}
errors++;
}
}
else {
const err98 = {instancePath:instancePath+"/between_laboratory_percent/aqueous_salts",schemaPath:"#/properties/between_laboratory_percent/properties/aqueous_salts/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err98];
}
else {
vErrors.push(err98);
}
errors++;
}
}
}
else {
const err99 = {instancePath:instancePath+"/between_laboratory_percent",schemaPath:"#/properties/between_laboratory_percent/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err99];
}
else {
vErrors.push(err99);
}
errors++;
}
}
if(data.composition_uncertainty_wt_percent !== undefined){
let data49 = data.composition_uncertainty_wt_percent;
if(data49 && typeof data49 == "object" && !Array.isArray(data49)){
for(const key9 in data49){
if(!(((key9 === "by_mass") || (key9 === "by_volume")) || (key9 === "plain_ethanol_water"))){
const err100 = {instancePath:instancePath+"/composition_uncertainty_wt_percent",schemaPath:"#/properties/composition_uncertainty_wt_percent/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key9},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err100];
}
else {
vErrors.push(err100);
}
errors++;
}
}
if(data49.by_mass !== undefined){
let data50 = data49.by_mass;
if((typeof data50 == "number") && (isFinite(data50))){
if(data50 < 0 || isNaN(data50)){
const err101 = {instancePath:instancePath+"/composition_uncertainty_wt_percent/by_mass",schemaPath:"#/properties/composition_uncertainty_wt_percent/properties/by_mass/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err101];
}
else {
vErrors.push(err101);
}
errors++;
}
}
else {
const err102 = {instancePath:instancePath+"/composition_uncertainty_wt_percent/by_mass",schemaPath:"#/properties/composition_uncertainty_wt_percent/properties/by_mass/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err102];
}
else {
vErrors.push(err102);
}
errors++;
}
}
if(data49.by_volume !== undefined){
let data51 = data49.by_volume;
if((typeof data51 == "number") && (isFinite(data51))){
if(data51 < 0 || isNaN(data51)){
const err103 = {instancePath:instancePath+"/composition_uncertainty_wt_percent/by_volume",schemaPath:"#/properties/composition_uncertainty_wt_percent/properties/by_volume/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err103];
}
else {
vErrors.push(err103);
}
errors++;
}
}
else {
const err104 = {instancePath:instancePath+"/composition_uncertainty_wt_percent/by_volume",schemaPath:"#/properties/composition_uncertainty_wt_percent/properties/by_volume/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err104];
}
else {
vErrors.push(err104);
}
errors++;
}
}
if(data49.plain_ethanol_water !== undefined){
let data52 = data49.plain_ethanol_water;
if((typeof data52 == "number") && (isFinite(data52))){
if(data52 < 0 || isNaN(data52)){
const err105 = {instancePath:instancePath+"/composition_uncertainty_wt_percent/plain_ethanol_water",schemaPath:"#/properties/composition_uncertainty_wt_percent/properties/plain_ethanol_water/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err105];
}
else {
vErrors.push(err105);
}
errors++;
}
}
else {
const err106 = {instancePath:instancePath+"/composition_uncertainty_wt_percent/plain_ethanol_water",schemaPath:"#/properties/composition_uncertainty_wt_percent/properties/plain_ethanol_water/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err106];
}
else {
vErrors.push(err106);
}
errors++;
}
}
}
else {
const err107 = {instancePath:instancePath+"/composition_uncertainty_wt_percent",schemaPath:"#/properties/composition_uncertainty_wt_percent/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err107];
}
else {
vErrors.push(err107);
}
errors++;
}
}
if(data.fit_weighting !== undefined){
let data53 = data.fit_weighting;
if(!((data53 === "relative") || (data53 === "absolute"))){
const err108 = {instancePath:instancePath+"/fit_weighting",schemaPath:"#/properties/fit_weighting/enum",keyword:"enum",params:{allowedValues: schema20.properties.fit_weighting.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err108];
}
else {
vErrors.push(err108);
}
errors++;
}
}
if(data.planning_excess_solvent_percent !== undefined){
let data54 = data.planning_excess_solvent_percent;
if((typeof data54 == "number") && (isFinite(data54))){
if(data54 < 0 || isNaN(data54)){
const err109 = {instancePath:instancePath+"/planning_excess_solvent_percent",schemaPath:"#/properties/planning_excess_solvent_percent/minimum",keyword:"minimum",params:{comparison: ">=", limit: 0},message:"must be >= 0"};
if(vErrors === null){
vErrors = [err109];
}
else {
vErrors.push(err109);
}
errors++;
}
}
else {
const err110 = {instancePath:instancePath+"/planning_excess_solvent_percent",schemaPath:"#/properties/planning_excess_solvent_percent/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err110];
}
else {
vErrors.push(err110);
}
errors++;
}
}
if(data.carry !== undefined){
let data55 = data.carry;
if(Array.isArray(data55)){
const len0 = data55.length;
for(let i0=0; i0<len0; i0++){
let data56 = data55[i0];
if(typeof data56 === "string"){
if(!pattern4.test(data56)){
const err111 = {instancePath:instancePath+"/carry/" + i0,schemaPath:"#/properties/carry/items/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err111];
}
else {
vErrors.push(err111);
}
errors++;
}
}
else {
const err112 = {instancePath:instancePath+"/carry/" + i0,schemaPath:"#/properties/carry/items/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err112];
}
else {
vErrors.push(err112);
}
errors++;
}
}
let i1 = data55.length;
let j0;
if(i1 > 1){
const indices0 = {};
for(;i1--;){
let item0 = data55[i1];
if(typeof item0 !== "string"){
continue;
}
if(typeof indices0[item0] == "number"){
j0 = indices0[item0];
const err113 = {instancePath:instancePath+"/carry",schemaPath:"#/properties/carry/uniqueItems",keyword:"uniqueItems",params:{i: i1, j: j0},message:"must NOT have duplicate items (items ## "+j0+" and "+i1+" are identical)"};
if(vErrors === null){
vErrors = [err113];
}
else {
vErrors.push(err113);
}
errors++;
break;
}
indices0[item0] = i1;
}
}
}
else {
const err114 = {instancePath:instancePath+"/carry",schemaPath:"#/properties/carry/type",keyword:"type",params:{type: "array"},message:"must be array"};
if(vErrors === null){
vErrors = [err114];
}
else {
vErrors.push(err114);
}
errors++;
}
}
}
else {
const err115 = {instancePath,schemaPath:"#/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err115];
}
else {
vErrors.push(err115);
}
errors++;
}
validate53.errors = vErrors;
return errors === 0;
}
validate53.evaluated = {"props":true,"dynamicProps":false,"dynamicItems":false};


function validate52(data, {instancePath="", parentData, parentDataProperty, rootData=data, dynamicAnchors={}}={}){
/*# sourceURL="collection.schema.json" */;
let vErrors = null;
let errors = 0;
const evaluated0 = validate52.evaluated;
if(evaluated0.dynamicProps){
evaluated0.props = undefined;
}
if(evaluated0.dynamicItems){
evaluated0.items = undefined;
}
if(data && typeof data == "object" && !Array.isArray(data)){
if(data.format === undefined){
const err0 = {instancePath,schemaPath:"#/required",keyword:"required",params:{missingProperty: "format"},message:"must have required property '"+"format"+"'"};
if(vErrors === null){
vErrors = [err0];
}
else {
vErrors.push(err0);
}
errors++;
}
if(data.name === undefined){
const err1 = {instancePath,schemaPath:"#/required",keyword:"required",params:{missingProperty: "name"},message:"must have required property '"+"name"+"'"};
if(vErrors === null){
vErrors = [err1];
}
else {
vErrors.push(err1);
}
errors++;
}
for(const key0 in data){
if(!((((((key0 === "$schema") || (key0 === "format")) || (key0 === "name")) || (key0 === "title")) || (key0 === "steward")) || (key0 === "settings"))){
const err2 = {instancePath,schemaPath:"#/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key0},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err2];
}
else {
vErrors.push(err2);
}
errors++;
}
}
if(data.$schema !== undefined){
if(typeof data.$schema !== "string"){
const err3 = {instancePath:instancePath+"/$schema",schemaPath:"#/properties/%24schema/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err3];
}
else {
vErrors.push(err3);
}
errors++;
}
}
if(data.format !== undefined){
if(1 !== data.format){
const err4 = {instancePath:instancePath+"/format",schemaPath:"#/properties/format/const",keyword:"const",params:{allowedValue: 1},message:"must be equal to constant"};
if(vErrors === null){
vErrors = [err4];
}
else {
vErrors.push(err4);
}
errors++;
}
}
if(data.name !== undefined){
let data2 = data.name;
if(typeof data2 === "string"){
if(!pattern3.test(data2)){
const err5 = {instancePath:instancePath+"/name",schemaPath:"#/properties/name/pattern",keyword:"pattern",params:{pattern: "^[a-z0-9][a-z0-9-]{0,63}$"},message:"must match pattern \""+"^[a-z0-9][a-z0-9-]{0,63}$"+"\""};
if(vErrors === null){
vErrors = [err5];
}
else {
vErrors.push(err5);
}
errors++;
}
}
else {
const err6 = {instancePath:instancePath+"/name",schemaPath:"#/properties/name/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err6];
}
else {
vErrors.push(err6);
}
errors++;
}
}
if(data.title !== undefined){
if(typeof data.title !== "string"){
const err7 = {instancePath:instancePath+"/title",schemaPath:"#/properties/title/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err7];
}
else {
vErrors.push(err7);
}
errors++;
}
}
if(data.steward !== undefined){
if(typeof data.steward !== "string"){
const err8 = {instancePath:instancePath+"/steward",schemaPath:"#/properties/steward/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err8];
}
else {
vErrors.push(err8);
}
errors++;
}
}
if(data.settings !== undefined){
if(!(validate53(data.settings, {instancePath:instancePath+"/settings",parentData:data,parentDataProperty:"settings",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate53.errors : vErrors.concat(validate53.errors);
errors = vErrors.length;
}
}
}
else {
const err9 = {instancePath,schemaPath:"#/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err9];
}
else {
vErrors.push(err9);
}
errors++;
}
validate52.errors = vErrors;
return errors === 0;
}
validate52.evaluated = {"props":true,"dynamicProps":false,"dynamicItems":false};

export const validateSourceCard = validate55;
const schema21 = {"$schema":"https://json-schema.org/draft/2020-12/schema","$id":"source-card.schema.json","type":"object","properties":{"$schema":{"type":"string"},"format":{"const":1},"source":{"type":"string","pattern":"^[a-z0-9][a-z0-9-]{0,63}$"},"title":{"type":["string","null"]},"origin":{"enum":["laboratory","literature","open-dataset","handbook"]},"reported_by":{"type":["string","null"]},"laboratory":{"type":["string","null"]},"date":{"type":["string","null"],"pattern":"^[0-9]{4}(-(0[1-9]|1[0-2])(-(0[1-9]|[12][0-9]|3[01]))?)?$"},"reference":{"type":["string","null"]},"doi":{"type":["string","null"],"pattern":"^10\\.[0-9]{4,9}/[^\\s]+$"},"licence":{"type":["string","null"]},"method":{"enum":["gravimetric","titration","hplc","uv","refractive-index","isothermal-synthetic","clear-point","cloud-point","kinetic-from-stock","unspecified"]},"file":{"type":"string","pattern":"\\S"},"shape":{"enum":["long"]},"table":{"$ref":"#/$defs/TableFormat"},"columns":{"$ref":"#/$defs/Columns"},"constants":{"$ref":"#/$defs/Constants"},"carry":{"type":"array","items":{"type":"string","pattern":"\\S"},"uniqueItems":true}},"required":["format","source","file","columns"],"additionalProperties":false,"$defs":{"TableFormat":{"type":"object","properties":{"encoding":{"enum":["auto","utf-8","utf-16le","utf-16be","windows-1252","iso-8859-15","macintosh","gb18030","shift_jis"]},"delimiter":{"enum":["auto",",",";","\t","|"]},"decimal":{"enum":["auto",".",","]},"header_line":{"type":"integer","minimum":1},"sheet":{"type":["string","null"]},"missing":{"type":"array","items":{"type":"string"},"uniqueItems":true}},"additionalProperties":false},"TextColumn":{"type":"object","properties":{"column":{"type":"string","pattern":"\\S"}},"required":["column"],"additionalProperties":false},"QuantityColumn":{"type":"object","dependentSchemas":{"unit":{"properties":{"unit_column":false}}},"properties":{"column":{"type":"string","pattern":"\\S"},"unit":{"type":"string","pattern":"\\S"},"unit_column":{"type":"string","pattern":"\\S"}},"required":["column"],"additionalProperties":false},"UncertaintyColumn":{"type":"object","dependentSchemas":{"unit":{"properties":{"unit_column":false}}},"properties":{"column":{"type":"string","pattern":"\\S"},"unit":{"type":"string","pattern":"\\S"},"unit_column":{"type":"string","pattern":"\\S"},"kind":{"enum":["standard","expanded","range","standard deviation"]},"relative":{"type":"boolean"}},"required":["column"],"additionalProperties":false},"QuantityConstant":{"type":"object","properties":{"value":{"type":["number","string"]},"unit":{"type":"string","pattern":"\\S"}},"required":["value","unit"],"additionalProperties":false},"UncertaintyConstant":{"type":"object","properties":{"value":{"type":"number","exclusiveMinimum":0},"unit":{"type":"string","pattern":"\\S"},"kind":{"enum":["standard","expanded","range","standard deviation"]},"relative":{"type":"boolean"}},"required":["value"],"additionalProperties":false},"Columns":{"type":"object","properties":{"solute":{"$ref":"#/$defs/TextColumn"},"solvent":{"$ref":"#/$defs/TextColumn"},"temperature":{"$ref":"#/$defs/QuantityColumn"},"solubility":{"$ref":"#/$defs/QuantityColumn"},"cas":{"$ref":"#/$defs/TextColumn"},"inchikey":{"$ref":"#/$defs/TextColumn"},"smiles":{"$ref":"#/$defs/TextColumn"},"formula":{"$ref":"#/$defs/TextColumn"},"molar_mass":{"$ref":"#/$defs/TextColumn"},"solid_form":{"$ref":"#/$defs/TextColumn"},"solute_basis":{"$ref":"#/$defs/TextColumn"},"composition":{"$ref":"#/$defs/TextColumn"},"composition_basis":{"$ref":"#/$defs/TextColumn"},"solvent_grade":{"$ref":"#/$defs/TextColumn"},"solvent_water_wt_percent":{"$ref":"#/$defs/TextColumn"},"medium":{"$ref":"#/$defs/TextColumn"},"pH_final":{"$ref":"#/$defs/TextColumn"},"stereo":{"$ref":"#/$defs/TextColumn"},"lot":{"$ref":"#/$defs/TextColumn"},"solute_purity":{"$ref":"#/$defs/TextColumn"},"uncertainty":{"$ref":"#/$defs/UncertaintyColumn"},"coverage_factor":{"$ref":"#/$defs/TextColumn"},"n":{"$ref":"#/$defs/TextColumn"},"temperature_uncertainty":{"$ref":"#/$defs/QuantityColumn"},"temperature_probe":{"$ref":"#/$defs/TextColumn"},"solution_density":{"$ref":"#/$defs/QuantityColumn"},"volume_temperature":{"$ref":"#/$defs/QuantityColumn"},"equilibration_h":{"$ref":"#/$defs/TextColumn"},"approach":{"$ref":"#/$defs/TextColumn"},"heating_rate_K_per_min":{"$ref":"#/$defs/TextColumn"},"filter_temperature":{"$ref":"#/$defs/QuantityColumn"},"excess_solid":{"$ref":"#/$defs/TextColumn"},"solid_before":{"$ref":"#/$defs/TextColumn"},"solid_after":{"$ref":"#/$defs/TextColumn"},"solid_check":{"$ref":"#/$defs/TextColumn"},"drying":{"$ref":"#/$defs/TextColumn"},"assay_after":{"$ref":"#/$defs/TextColumn"},"method":{"$ref":"#/$defs/TextColumn"},"replicate":{"$ref":"#/$defs/TextColumn"},"measured_on":{"$ref":"#/$defs/TextColumn"},"reference":{"$ref":"#/$defs/TextColumn"},"doi":{"$ref":"#/$defs/TextColumn"},"note":{"$ref":"#/$defs/TextColumn"}},"additionalProperties":false},"Constants":{"type":"object","properties":{"solute":{"type":"string","pattern":"\\S"},"solvent":{"type":"string","pattern":"\\S"},"temperature":{"$ref":"#/$defs/QuantityConstant"},"solubility":{"$ref":"#/$defs/QuantityConstant"},"cas":{"type":"string","pattern":"\\S"},"inchikey":{"type":"string","pattern":"\\S"},"smiles":{"type":"string","pattern":"\\S"},"formula":{"type":"string","pattern":"\\S"},"molar_mass":{"type":"number"},"solid_form":{"type":"string","pattern":"\\S"},"solute_basis":{"enum":["anhydrous","hydrate per added solvent","hydrate equivalent per total solvent"]},"composition":{"type":["string","number"]},"composition_basis":{"type":"string","pattern":"\\S"},"solvent_grade":{"type":"string","pattern":"\\S"},"solvent_water_wt_percent":{"type":"number"},"medium":{"type":"string","pattern":"\\S"},"pH_final":{"type":"number"},"stereo":{"type":"string","pattern":"\\S"},"lot":{"type":"string","pattern":"\\S"},"solute_purity":{"type":["string","number"]},"uncertainty":{"$ref":"#/$defs/UncertaintyConstant"},"coverage_factor":{"type":"number"},"n":{"type":"number"},"temperature_uncertainty":{"$ref":"#/$defs/QuantityConstant"},"temperature_probe":{"enum":["solution","bath","jacket"]},"solution_density":{"$ref":"#/$defs/QuantityConstant"},"volume_temperature":{"$ref":"#/$defs/QuantityConstant"},"equilibration_h":{"type":"number"},"approach":{"enum":["from below","from above","both","heating to clear","cooling to cloud"]},"heating_rate_K_per_min":{"type":"number"},"filter_temperature":{"$ref":"#/$defs/QuantityConstant"},"excess_solid":{"enum":["yes","no","unknown"]},"solid_before":{"type":"string","pattern":"\\S"},"solid_after":{"type":"string","pattern":"\\S"},"solid_check":{"enum":["none","XRPD","Raman","DSC","TGA","Karl Fischer"]},"drying":{"type":"string","pattern":"\\S"},"assay_after":{"type":["string","number"]},"method":{"enum":["gravimetric","titration","hplc","uv","refractive-index","isothermal-synthetic","clear-point","cloud-point","kinetic-from-stock","unspecified"]},"replicate":{"type":["string","number"]},"measured_on":{"type":"string","pattern":"\\S"},"reference":{"type":"string","pattern":"\\S"},"doi":{"type":"string","pattern":"\\S"},"note":{"type":"string","pattern":"\\S"}},"additionalProperties":false}}};
const pattern6 = new RegExp("^[0-9]{4}(-(0[1-9]|1[0-2])(-(0[1-9]|[12][0-9]|3[01]))?)?$", "u");
const pattern7 = new RegExp("^10\\.[0-9]{4,9}/[^\\s]+$", "u");
const schema22 = {"type":"object","properties":{"encoding":{"enum":["auto","utf-8","utf-16le","utf-16be","windows-1252","iso-8859-15","macintosh","gb18030","shift_jis"]},"delimiter":{"enum":["auto",",",";","\t","|"]},"decimal":{"enum":["auto",".",","]},"header_line":{"type":"integer","minimum":1},"sheet":{"type":["string","null"]},"missing":{"type":"array","items":{"type":"string"},"uniqueItems":true}},"additionalProperties":false};

function validate56(data, {instancePath="", parentData, parentDataProperty, rootData=data, dynamicAnchors={}}={}){
let vErrors = null;
let errors = 0;
const evaluated0 = validate56.evaluated;
if(evaluated0.dynamicProps){
evaluated0.props = undefined;
}
if(evaluated0.dynamicItems){
evaluated0.items = undefined;
}
if(data && typeof data == "object" && !Array.isArray(data)){
for(const key0 in data){
if(!((((((key0 === "encoding") || (key0 === "delimiter")) || (key0 === "decimal")) || (key0 === "header_line")) || (key0 === "sheet")) || (key0 === "missing"))){
const err0 = {instancePath,schemaPath:"#/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key0},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err0];
}
else {
vErrors.push(err0);
}
errors++;
}
}
if(data.encoding !== undefined){
let data0 = data.encoding;
if(!(((((((((data0 === "auto") || (data0 === "utf-8")) || (data0 === "utf-16le")) || (data0 === "utf-16be")) || (data0 === "windows-1252")) || (data0 === "iso-8859-15")) || (data0 === "macintosh")) || (data0 === "gb18030")) || (data0 === "shift_jis"))){
const err1 = {instancePath:instancePath+"/encoding",schemaPath:"#/properties/encoding/enum",keyword:"enum",params:{allowedValues: schema22.properties.encoding.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err1];
}
else {
vErrors.push(err1);
}
errors++;
}
}
if(data.delimiter !== undefined){
let data1 = data.delimiter;
if(!(((((data1 === "auto") || (data1 === ",")) || (data1 === ";")) || (data1 === "\t")) || (data1 === "|"))){
const err2 = {instancePath:instancePath+"/delimiter",schemaPath:"#/properties/delimiter/enum",keyword:"enum",params:{allowedValues: schema22.properties.delimiter.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err2];
}
else {
vErrors.push(err2);
}
errors++;
}
}
if(data.decimal !== undefined){
let data2 = data.decimal;
if(!(((data2 === "auto") || (data2 === ".")) || (data2 === ","))){
const err3 = {instancePath:instancePath+"/decimal",schemaPath:"#/properties/decimal/enum",keyword:"enum",params:{allowedValues: schema22.properties.decimal.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err3];
}
else {
vErrors.push(err3);
}
errors++;
}
}
if(data.header_line !== undefined){
let data3 = data.header_line;
if(!(((typeof data3 == "number") && (!(data3 % 1) && !isNaN(data3))) && (isFinite(data3)))){
const err4 = {instancePath:instancePath+"/header_line",schemaPath:"#/properties/header_line/type",keyword:"type",params:{type: "integer"},message:"must be integer"};
if(vErrors === null){
vErrors = [err4];
}
else {
vErrors.push(err4);
}
errors++;
}
if((typeof data3 == "number") && (isFinite(data3))){
if(data3 < 1 || isNaN(data3)){
const err5 = {instancePath:instancePath+"/header_line",schemaPath:"#/properties/header_line/minimum",keyword:"minimum",params:{comparison: ">=", limit: 1},message:"must be >= 1"};
if(vErrors === null){
vErrors = [err5];
}
else {
vErrors.push(err5);
}
errors++;
}
}
}
if(data.sheet !== undefined){
let data4 = data.sheet;
if((typeof data4 !== "string") && (data4 !== null)){
const err6 = {instancePath:instancePath+"/sheet",schemaPath:"#/properties/sheet/type",keyword:"type",params:{type: schema22.properties.sheet.type},message:"must be string,null"};
if(vErrors === null){
vErrors = [err6];
}
else {
vErrors.push(err6);
}
errors++;
}
}
if(data.missing !== undefined){
let data5 = data.missing;
if(Array.isArray(data5)){
const len0 = data5.length;
for(let i0=0; i0<len0; i0++){
if(typeof data5[i0] !== "string"){
const err7 = {instancePath:instancePath+"/missing/" + i0,schemaPath:"#/properties/missing/items/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err7];
}
else {
vErrors.push(err7);
}
errors++;
}
}
let i1 = data5.length;
let j0;
if(i1 > 1){
const indices0 = {};
for(;i1--;){
let item0 = data5[i1];
if(typeof item0 !== "string"){
continue;
}
if(typeof indices0[item0] == "number"){
j0 = indices0[item0];
const err8 = {instancePath:instancePath+"/missing",schemaPath:"#/properties/missing/uniqueItems",keyword:"uniqueItems",params:{i: i1, j: j0},message:"must NOT have duplicate items (items ## "+j0+" and "+i1+" are identical)"};
if(vErrors === null){
vErrors = [err8];
}
else {
vErrors.push(err8);
}
errors++;
break;
}
indices0[item0] = i1;
}
}
}
else {
const err9 = {instancePath:instancePath+"/missing",schemaPath:"#/properties/missing/type",keyword:"type",params:{type: "array"},message:"must be array"};
if(vErrors === null){
vErrors = [err9];
}
else {
vErrors.push(err9);
}
errors++;
}
}
}
else {
const err10 = {instancePath,schemaPath:"#/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err10];
}
else {
vErrors.push(err10);
}
errors++;
}
validate56.errors = vErrors;
return errors === 0;
}
validate56.evaluated = {"props":true,"dynamicProps":false,"dynamicItems":false};

const schema23 = {"type":"object","properties":{"solute":{"$ref":"#/$defs/TextColumn"},"solvent":{"$ref":"#/$defs/TextColumn"},"temperature":{"$ref":"#/$defs/QuantityColumn"},"solubility":{"$ref":"#/$defs/QuantityColumn"},"cas":{"$ref":"#/$defs/TextColumn"},"inchikey":{"$ref":"#/$defs/TextColumn"},"smiles":{"$ref":"#/$defs/TextColumn"},"formula":{"$ref":"#/$defs/TextColumn"},"molar_mass":{"$ref":"#/$defs/TextColumn"},"solid_form":{"$ref":"#/$defs/TextColumn"},"solute_basis":{"$ref":"#/$defs/TextColumn"},"composition":{"$ref":"#/$defs/TextColumn"},"composition_basis":{"$ref":"#/$defs/TextColumn"},"solvent_grade":{"$ref":"#/$defs/TextColumn"},"solvent_water_wt_percent":{"$ref":"#/$defs/TextColumn"},"medium":{"$ref":"#/$defs/TextColumn"},"pH_final":{"$ref":"#/$defs/TextColumn"},"stereo":{"$ref":"#/$defs/TextColumn"},"lot":{"$ref":"#/$defs/TextColumn"},"solute_purity":{"$ref":"#/$defs/TextColumn"},"uncertainty":{"$ref":"#/$defs/UncertaintyColumn"},"coverage_factor":{"$ref":"#/$defs/TextColumn"},"n":{"$ref":"#/$defs/TextColumn"},"temperature_uncertainty":{"$ref":"#/$defs/QuantityColumn"},"temperature_probe":{"$ref":"#/$defs/TextColumn"},"solution_density":{"$ref":"#/$defs/QuantityColumn"},"volume_temperature":{"$ref":"#/$defs/QuantityColumn"},"equilibration_h":{"$ref":"#/$defs/TextColumn"},"approach":{"$ref":"#/$defs/TextColumn"},"heating_rate_K_per_min":{"$ref":"#/$defs/TextColumn"},"filter_temperature":{"$ref":"#/$defs/QuantityColumn"},"excess_solid":{"$ref":"#/$defs/TextColumn"},"solid_before":{"$ref":"#/$defs/TextColumn"},"solid_after":{"$ref":"#/$defs/TextColumn"},"solid_check":{"$ref":"#/$defs/TextColumn"},"drying":{"$ref":"#/$defs/TextColumn"},"assay_after":{"$ref":"#/$defs/TextColumn"},"method":{"$ref":"#/$defs/TextColumn"},"replicate":{"$ref":"#/$defs/TextColumn"},"measured_on":{"$ref":"#/$defs/TextColumn"},"reference":{"$ref":"#/$defs/TextColumn"},"doi":{"$ref":"#/$defs/TextColumn"},"note":{"$ref":"#/$defs/TextColumn"}},"additionalProperties":false};
const schema24 = {"type":"object","properties":{"column":{"type":"string","pattern":"\\S"}},"required":["column"],"additionalProperties":false};

function validate59(data, {instancePath="", parentData, parentDataProperty, rootData=data, dynamicAnchors={}}={}){
let vErrors = null;
let errors = 0;
const evaluated0 = validate59.evaluated;
if(evaluated0.dynamicProps){
evaluated0.props = undefined;
}
if(evaluated0.dynamicItems){
evaluated0.items = undefined;
}
if(data && typeof data == "object" && !Array.isArray(data)){
if(data.column === undefined){
const err0 = {instancePath,schemaPath:"#/required",keyword:"required",params:{missingProperty: "column"},message:"must have required property '"+"column"+"'"};
if(vErrors === null){
vErrors = [err0];
}
else {
vErrors.push(err0);
}
errors++;
}
for(const key0 in data){
if(!(key0 === "column")){
const err1 = {instancePath,schemaPath:"#/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key0},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err1];
}
else {
vErrors.push(err1);
}
errors++;
}
}
if(data.column !== undefined){
let data0 = data.column;
if(typeof data0 === "string"){
if(!pattern4.test(data0)){
const err2 = {instancePath:instancePath+"/column",schemaPath:"#/properties/column/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err2];
}
else {
vErrors.push(err2);
}
errors++;
}
}
else {
const err3 = {instancePath:instancePath+"/column",schemaPath:"#/properties/column/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err3];
}
else {
vErrors.push(err3);
}
errors++;
}
}
}
else {
const err4 = {instancePath,schemaPath:"#/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err4];
}
else {
vErrors.push(err4);
}
errors++;
}
validate59.errors = vErrors;
return errors === 0;
}
validate59.evaluated = {"props":true,"dynamicProps":false,"dynamicItems":false};

const schema25 = {"type":"object","dependentSchemas":{"unit":{"properties":{"unit_column":false}}},"properties":{"column":{"type":"string","pattern":"\\S"},"unit":{"type":"string","pattern":"\\S"},"unit_column":{"type":"string","pattern":"\\S"}},"required":["column"],"additionalProperties":false};

function validate62(data, {instancePath="", parentData, parentDataProperty, rootData=data, dynamicAnchors={}}={}){
let vErrors = null;
let errors = 0;
const evaluated0 = validate62.evaluated;
if(evaluated0.dynamicProps){
evaluated0.props = undefined;
}
if(evaluated0.dynamicItems){
evaluated0.items = undefined;
}
if(data && typeof data == "object" && !Array.isArray(data)){
if(data.column === undefined){
const err0 = {instancePath,schemaPath:"#/required",keyword:"required",params:{missingProperty: "column"},message:"must have required property '"+"column"+"'"};
if(vErrors === null){
vErrors = [err0];
}
else {
vErrors.push(err0);
}
errors++;
}
for(const key0 in data){
if(!(((key0 === "column") || (key0 === "unit")) || (key0 === "unit_column"))){
const err1 = {instancePath,schemaPath:"#/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key0},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err1];
}
else {
vErrors.push(err1);
}
errors++;
}
}
if(data.column !== undefined){
let data0 = data.column;
if(typeof data0 === "string"){
if(!pattern4.test(data0)){
const err2 = {instancePath:instancePath+"/column",schemaPath:"#/properties/column/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err2];
}
else {
vErrors.push(err2);
}
errors++;
}
}
else {
const err3 = {instancePath:instancePath+"/column",schemaPath:"#/properties/column/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err3];
}
else {
vErrors.push(err3);
}
errors++;
}
}
if(data.unit !== undefined){
let data1 = data.unit;
if(typeof data1 === "string"){
if(!pattern4.test(data1)){
const err4 = {instancePath:instancePath+"/unit",schemaPath:"#/properties/unit/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err4];
}
else {
vErrors.push(err4);
}
errors++;
}
}
else {
const err5 = {instancePath:instancePath+"/unit",schemaPath:"#/properties/unit/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err5];
}
else {
vErrors.push(err5);
}
errors++;
}
}
if(data.unit_column !== undefined){
let data2 = data.unit_column;
if(typeof data2 === "string"){
if(!pattern4.test(data2)){
const err6 = {instancePath:instancePath+"/unit_column",schemaPath:"#/properties/unit_column/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err6];
}
else {
vErrors.push(err6);
}
errors++;
}
}
else {
const err7 = {instancePath:instancePath+"/unit_column",schemaPath:"#/properties/unit_column/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err7];
}
else {
vErrors.push(err7);
}
errors++;
}
}
if(data.unit !== undefined){
if(data && typeof data == "object" && !Array.isArray(data)){
if(data.unit_column !== undefined){
const err8 = {instancePath:instancePath+"/unit_column",schemaPath:"#/dependentSchemas/unit/properties/unit_column/false schema",keyword:"false schema",params:{},message:"boolean schema is false"};
if(vErrors === null){
vErrors = [err8];
}
else {
vErrors.push(err8);
}
errors++;
}
}
}
}
else {
const err9 = {instancePath,schemaPath:"#/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err9];
}
else {
vErrors.push(err9);
}
errors++;
}
validate62.errors = vErrors;
return errors === 0;
}
validate62.evaluated = {"props":true,"dynamicProps":false,"dynamicItems":false};

const schema26 = {"type":"object","dependentSchemas":{"unit":{"properties":{"unit_column":false}}},"properties":{"column":{"type":"string","pattern":"\\S"},"unit":{"type":"string","pattern":"\\S"},"unit_column":{"type":"string","pattern":"\\S"},"kind":{"enum":["standard","expanded","range","standard deviation"]},"relative":{"type":"boolean"}},"required":["column"],"additionalProperties":false};

function validate81(data, {instancePath="", parentData, parentDataProperty, rootData=data, dynamicAnchors={}}={}){
let vErrors = null;
let errors = 0;
const evaluated0 = validate81.evaluated;
if(evaluated0.dynamicProps){
evaluated0.props = undefined;
}
if(evaluated0.dynamicItems){
evaluated0.items = undefined;
}
if(data && typeof data == "object" && !Array.isArray(data)){
if(data.column === undefined){
const err0 = {instancePath,schemaPath:"#/required",keyword:"required",params:{missingProperty: "column"},message:"must have required property '"+"column"+"'"};
if(vErrors === null){
vErrors = [err0];
}
else {
vErrors.push(err0);
}
errors++;
}
for(const key0 in data){
if(!(((((key0 === "column") || (key0 === "unit")) || (key0 === "unit_column")) || (key0 === "kind")) || (key0 === "relative"))){
const err1 = {instancePath,schemaPath:"#/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key0},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err1];
}
else {
vErrors.push(err1);
}
errors++;
}
}
if(data.column !== undefined){
let data0 = data.column;
if(typeof data0 === "string"){
if(!pattern4.test(data0)){
const err2 = {instancePath:instancePath+"/column",schemaPath:"#/properties/column/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err2];
}
else {
vErrors.push(err2);
}
errors++;
}
}
else {
const err3 = {instancePath:instancePath+"/column",schemaPath:"#/properties/column/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err3];
}
else {
vErrors.push(err3);
}
errors++;
}
}
if(data.unit !== undefined){
let data1 = data.unit;
if(typeof data1 === "string"){
if(!pattern4.test(data1)){
const err4 = {instancePath:instancePath+"/unit",schemaPath:"#/properties/unit/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err4];
}
else {
vErrors.push(err4);
}
errors++;
}
}
else {
const err5 = {instancePath:instancePath+"/unit",schemaPath:"#/properties/unit/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err5];
}
else {
vErrors.push(err5);
}
errors++;
}
}
if(data.unit_column !== undefined){
let data2 = data.unit_column;
if(typeof data2 === "string"){
if(!pattern4.test(data2)){
const err6 = {instancePath:instancePath+"/unit_column",schemaPath:"#/properties/unit_column/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err6];
}
else {
vErrors.push(err6);
}
errors++;
}
}
else {
const err7 = {instancePath:instancePath+"/unit_column",schemaPath:"#/properties/unit_column/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err7];
}
else {
vErrors.push(err7);
}
errors++;
}
}
if(data.kind !== undefined){
let data3 = data.kind;
if(!((((data3 === "standard") || (data3 === "expanded")) || (data3 === "range")) || (data3 === "standard deviation"))){
const err8 = {instancePath:instancePath+"/kind",schemaPath:"#/properties/kind/enum",keyword:"enum",params:{allowedValues: schema26.properties.kind.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err8];
}
else {
vErrors.push(err8);
}
errors++;
}
}
if(data.relative !== undefined){
if(typeof data.relative !== "boolean"){
const err9 = {instancePath:instancePath+"/relative",schemaPath:"#/properties/relative/type",keyword:"type",params:{type: "boolean"},message:"must be boolean"};
if(vErrors === null){
vErrors = [err9];
}
else {
vErrors.push(err9);
}
errors++;
}
}
if(data.unit !== undefined){
if(data && typeof data == "object" && !Array.isArray(data)){
if(data.unit_column !== undefined){
const err10 = {instancePath:instancePath+"/unit_column",schemaPath:"#/dependentSchemas/unit/properties/unit_column/false schema",keyword:"false schema",params:{},message:"boolean schema is false"};
if(vErrors === null){
vErrors = [err10];
}
else {
vErrors.push(err10);
}
errors++;
}
}
}
}
else {
const err11 = {instancePath,schemaPath:"#/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err11];
}
else {
vErrors.push(err11);
}
errors++;
}
validate81.errors = vErrors;
return errors === 0;
}
validate81.evaluated = {"props":true,"dynamicProps":false,"dynamicItems":false};


function validate58(data, {instancePath="", parentData, parentDataProperty, rootData=data, dynamicAnchors={}}={}){
let vErrors = null;
let errors = 0;
const evaluated0 = validate58.evaluated;
if(evaluated0.dynamicProps){
evaluated0.props = undefined;
}
if(evaluated0.dynamicItems){
evaluated0.items = undefined;
}
if(data && typeof data == "object" && !Array.isArray(data)){
for(const key0 in data){
if(!(func1.call(schema23.properties, key0))){
const err0 = {instancePath,schemaPath:"#/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key0},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err0];
}
else {
vErrors.push(err0);
}
errors++;
}
}
if(data.solute !== undefined){
if(!(validate59(data.solute, {instancePath:instancePath+"/solute",parentData:data,parentDataProperty:"solute",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.solvent !== undefined){
if(!(validate59(data.solvent, {instancePath:instancePath+"/solvent",parentData:data,parentDataProperty:"solvent",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.temperature !== undefined){
if(!(validate62(data.temperature, {instancePath:instancePath+"/temperature",parentData:data,parentDataProperty:"temperature",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate62.errors : vErrors.concat(validate62.errors);
errors = vErrors.length;
}
}
if(data.solubility !== undefined){
if(!(validate62(data.solubility, {instancePath:instancePath+"/solubility",parentData:data,parentDataProperty:"solubility",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate62.errors : vErrors.concat(validate62.errors);
errors = vErrors.length;
}
}
if(data.cas !== undefined){
if(!(validate59(data.cas, {instancePath:instancePath+"/cas",parentData:data,parentDataProperty:"cas",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.inchikey !== undefined){
if(!(validate59(data.inchikey, {instancePath:instancePath+"/inchikey",parentData:data,parentDataProperty:"inchikey",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.smiles !== undefined){
if(!(validate59(data.smiles, {instancePath:instancePath+"/smiles",parentData:data,parentDataProperty:"smiles",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.formula !== undefined){
if(!(validate59(data.formula, {instancePath:instancePath+"/formula",parentData:data,parentDataProperty:"formula",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.molar_mass !== undefined){
if(!(validate59(data.molar_mass, {instancePath:instancePath+"/molar_mass",parentData:data,parentDataProperty:"molar_mass",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.solid_form !== undefined){
if(!(validate59(data.solid_form, {instancePath:instancePath+"/solid_form",parentData:data,parentDataProperty:"solid_form",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.solute_basis !== undefined){
if(!(validate59(data.solute_basis, {instancePath:instancePath+"/solute_basis",parentData:data,parentDataProperty:"solute_basis",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.composition !== undefined){
if(!(validate59(data.composition, {instancePath:instancePath+"/composition",parentData:data,parentDataProperty:"composition",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.composition_basis !== undefined){
if(!(validate59(data.composition_basis, {instancePath:instancePath+"/composition_basis",parentData:data,parentDataProperty:"composition_basis",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.solvent_grade !== undefined){
if(!(validate59(data.solvent_grade, {instancePath:instancePath+"/solvent_grade",parentData:data,parentDataProperty:"solvent_grade",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.solvent_water_wt_percent !== undefined){
if(!(validate59(data.solvent_water_wt_percent, {instancePath:instancePath+"/solvent_water_wt_percent",parentData:data,parentDataProperty:"solvent_water_wt_percent",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.medium !== undefined){
if(!(validate59(data.medium, {instancePath:instancePath+"/medium",parentData:data,parentDataProperty:"medium",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.pH_final !== undefined){
if(!(validate59(data.pH_final, {instancePath:instancePath+"/pH_final",parentData:data,parentDataProperty:"pH_final",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.stereo !== undefined){
if(!(validate59(data.stereo, {instancePath:instancePath+"/stereo",parentData:data,parentDataProperty:"stereo",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.lot !== undefined){
if(!(validate59(data.lot, {instancePath:instancePath+"/lot",parentData:data,parentDataProperty:"lot",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.solute_purity !== undefined){
if(!(validate59(data.solute_purity, {instancePath:instancePath+"/solute_purity",parentData:data,parentDataProperty:"solute_purity",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.uncertainty !== undefined){
if(!(validate81(data.uncertainty, {instancePath:instancePath+"/uncertainty",parentData:data,parentDataProperty:"uncertainty",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate81.errors : vErrors.concat(validate81.errors);
errors = vErrors.length;
}
}
if(data.coverage_factor !== undefined){
if(!(validate59(data.coverage_factor, {instancePath:instancePath+"/coverage_factor",parentData:data,parentDataProperty:"coverage_factor",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.n !== undefined){
if(!(validate59(data.n, {instancePath:instancePath+"/n",parentData:data,parentDataProperty:"n",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.temperature_uncertainty !== undefined){
if(!(validate62(data.temperature_uncertainty, {instancePath:instancePath+"/temperature_uncertainty",parentData:data,parentDataProperty:"temperature_uncertainty",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate62.errors : vErrors.concat(validate62.errors);
errors = vErrors.length;
}
}
if(data.temperature_probe !== undefined){
if(!(validate59(data.temperature_probe, {instancePath:instancePath+"/temperature_probe",parentData:data,parentDataProperty:"temperature_probe",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.solution_density !== undefined){
if(!(validate62(data.solution_density, {instancePath:instancePath+"/solution_density",parentData:data,parentDataProperty:"solution_density",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate62.errors : vErrors.concat(validate62.errors);
errors = vErrors.length;
}
}
if(data.volume_temperature !== undefined){
if(!(validate62(data.volume_temperature, {instancePath:instancePath+"/volume_temperature",parentData:data,parentDataProperty:"volume_temperature",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate62.errors : vErrors.concat(validate62.errors);
errors = vErrors.length;
}
}
if(data.equilibration_h !== undefined){
if(!(validate59(data.equilibration_h, {instancePath:instancePath+"/equilibration_h",parentData:data,parentDataProperty:"equilibration_h",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.approach !== undefined){
if(!(validate59(data.approach, {instancePath:instancePath+"/approach",parentData:data,parentDataProperty:"approach",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.heating_rate_K_per_min !== undefined){
if(!(validate59(data.heating_rate_K_per_min, {instancePath:instancePath+"/heating_rate_K_per_min",parentData:data,parentDataProperty:"heating_rate_K_per_min",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.filter_temperature !== undefined){
if(!(validate62(data.filter_temperature, {instancePath:instancePath+"/filter_temperature",parentData:data,parentDataProperty:"filter_temperature",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate62.errors : vErrors.concat(validate62.errors);
errors = vErrors.length;
}
}
if(data.excess_solid !== undefined){
if(!(validate59(data.excess_solid, {instancePath:instancePath+"/excess_solid",parentData:data,parentDataProperty:"excess_solid",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.solid_before !== undefined){
if(!(validate59(data.solid_before, {instancePath:instancePath+"/solid_before",parentData:data,parentDataProperty:"solid_before",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.solid_after !== undefined){
if(!(validate59(data.solid_after, {instancePath:instancePath+"/solid_after",parentData:data,parentDataProperty:"solid_after",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.solid_check !== undefined){
if(!(validate59(data.solid_check, {instancePath:instancePath+"/solid_check",parentData:data,parentDataProperty:"solid_check",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.drying !== undefined){
if(!(validate59(data.drying, {instancePath:instancePath+"/drying",parentData:data,parentDataProperty:"drying",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.assay_after !== undefined){
if(!(validate59(data.assay_after, {instancePath:instancePath+"/assay_after",parentData:data,parentDataProperty:"assay_after",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.method !== undefined){
if(!(validate59(data.method, {instancePath:instancePath+"/method",parentData:data,parentDataProperty:"method",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.replicate !== undefined){
if(!(validate59(data.replicate, {instancePath:instancePath+"/replicate",parentData:data,parentDataProperty:"replicate",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.measured_on !== undefined){
if(!(validate59(data.measured_on, {instancePath:instancePath+"/measured_on",parentData:data,parentDataProperty:"measured_on",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.reference !== undefined){
if(!(validate59(data.reference, {instancePath:instancePath+"/reference",parentData:data,parentDataProperty:"reference",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.doi !== undefined){
if(!(validate59(data.doi, {instancePath:instancePath+"/doi",parentData:data,parentDataProperty:"doi",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
if(data.note !== undefined){
if(!(validate59(data.note, {instancePath:instancePath+"/note",parentData:data,parentDataProperty:"note",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate59.errors : vErrors.concat(validate59.errors);
errors = vErrors.length;
}
}
}
else {
const err1 = {instancePath,schemaPath:"#/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err1];
}
else {
vErrors.push(err1);
}
errors++;
}
validate58.errors = vErrors;
return errors === 0;
}
validate58.evaluated = {"props":true,"dynamicProps":false,"dynamicItems":false};

const schema27 = {"type":"object","properties":{"solute":{"type":"string","pattern":"\\S"},"solvent":{"type":"string","pattern":"\\S"},"temperature":{"$ref":"#/$defs/QuantityConstant"},"solubility":{"$ref":"#/$defs/QuantityConstant"},"cas":{"type":"string","pattern":"\\S"},"inchikey":{"type":"string","pattern":"\\S"},"smiles":{"type":"string","pattern":"\\S"},"formula":{"type":"string","pattern":"\\S"},"molar_mass":{"type":"number"},"solid_form":{"type":"string","pattern":"\\S"},"solute_basis":{"enum":["anhydrous","hydrate per added solvent","hydrate equivalent per total solvent"]},"composition":{"type":["string","number"]},"composition_basis":{"type":"string","pattern":"\\S"},"solvent_grade":{"type":"string","pattern":"\\S"},"solvent_water_wt_percent":{"type":"number"},"medium":{"type":"string","pattern":"\\S"},"pH_final":{"type":"number"},"stereo":{"type":"string","pattern":"\\S"},"lot":{"type":"string","pattern":"\\S"},"solute_purity":{"type":["string","number"]},"uncertainty":{"$ref":"#/$defs/UncertaintyConstant"},"coverage_factor":{"type":"number"},"n":{"type":"number"},"temperature_uncertainty":{"$ref":"#/$defs/QuantityConstant"},"temperature_probe":{"enum":["solution","bath","jacket"]},"solution_density":{"$ref":"#/$defs/QuantityConstant"},"volume_temperature":{"$ref":"#/$defs/QuantityConstant"},"equilibration_h":{"type":"number"},"approach":{"enum":["from below","from above","both","heating to clear","cooling to cloud"]},"heating_rate_K_per_min":{"type":"number"},"filter_temperature":{"$ref":"#/$defs/QuantityConstant"},"excess_solid":{"enum":["yes","no","unknown"]},"solid_before":{"type":"string","pattern":"\\S"},"solid_after":{"type":"string","pattern":"\\S"},"solid_check":{"enum":["none","XRPD","Raman","DSC","TGA","Karl Fischer"]},"drying":{"type":"string","pattern":"\\S"},"assay_after":{"type":["string","number"]},"method":{"enum":["gravimetric","titration","hplc","uv","refractive-index","isothermal-synthetic","clear-point","cloud-point","kinetic-from-stock","unspecified"]},"replicate":{"type":["string","number"]},"measured_on":{"type":"string","pattern":"\\S"},"reference":{"type":"string","pattern":"\\S"},"doi":{"type":"string","pattern":"\\S"},"note":{"type":"string","pattern":"\\S"}},"additionalProperties":false};
const schema28 = {"type":"object","properties":{"value":{"type":["number","string"]},"unit":{"type":"string","pattern":"\\S"}},"required":["value","unit"],"additionalProperties":false};

function validate107(data, {instancePath="", parentData, parentDataProperty, rootData=data, dynamicAnchors={}}={}){
let vErrors = null;
let errors = 0;
const evaluated0 = validate107.evaluated;
if(evaluated0.dynamicProps){
evaluated0.props = undefined;
}
if(evaluated0.dynamicItems){
evaluated0.items = undefined;
}
if(data && typeof data == "object" && !Array.isArray(data)){
if(data.value === undefined){
const err0 = {instancePath,schemaPath:"#/required",keyword:"required",params:{missingProperty: "value"},message:"must have required property '"+"value"+"'"};
if(vErrors === null){
vErrors = [err0];
}
else {
vErrors.push(err0);
}
errors++;
}
if(data.unit === undefined){
const err1 = {instancePath,schemaPath:"#/required",keyword:"required",params:{missingProperty: "unit"},message:"must have required property '"+"unit"+"'"};
if(vErrors === null){
vErrors = [err1];
}
else {
vErrors.push(err1);
}
errors++;
}
for(const key0 in data){
if(!((key0 === "value") || (key0 === "unit"))){
const err2 = {instancePath,schemaPath:"#/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key0},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err2];
}
else {
vErrors.push(err2);
}
errors++;
}
}
if(data.value !== undefined){
let data0 = data.value;
if((!((typeof data0 == "number") && (isFinite(data0)))) && (typeof data0 !== "string")){
const err3 = {instancePath:instancePath+"/value",schemaPath:"#/properties/value/type",keyword:"type",params:{type: schema28.properties.value.type},message:"must be number,string"};
if(vErrors === null){
vErrors = [err3];
}
else {
vErrors.push(err3);
}
errors++;
}
}
if(data.unit !== undefined){
let data1 = data.unit;
if(typeof data1 === "string"){
if(!pattern4.test(data1)){
const err4 = {instancePath:instancePath+"/unit",schemaPath:"#/properties/unit/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err4];
}
else {
vErrors.push(err4);
}
errors++;
}
}
else {
const err5 = {instancePath:instancePath+"/unit",schemaPath:"#/properties/unit/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err5];
}
else {
vErrors.push(err5);
}
errors++;
}
}
}
else {
const err6 = {instancePath,schemaPath:"#/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err6];
}
else {
vErrors.push(err6);
}
errors++;
}
validate107.errors = vErrors;
return errors === 0;
}
validate107.evaluated = {"props":true,"dynamicProps":false,"dynamicItems":false};

const schema29 = {"type":"object","properties":{"value":{"type":"number","exclusiveMinimum":0},"unit":{"type":"string","pattern":"\\S"},"kind":{"enum":["standard","expanded","range","standard deviation"]},"relative":{"type":"boolean"}},"required":["value"],"additionalProperties":false};

function validate110(data, {instancePath="", parentData, parentDataProperty, rootData=data, dynamicAnchors={}}={}){
let vErrors = null;
let errors = 0;
const evaluated0 = validate110.evaluated;
if(evaluated0.dynamicProps){
evaluated0.props = undefined;
}
if(evaluated0.dynamicItems){
evaluated0.items = undefined;
}
if(data && typeof data == "object" && !Array.isArray(data)){
if(data.value === undefined){
const err0 = {instancePath,schemaPath:"#/required",keyword:"required",params:{missingProperty: "value"},message:"must have required property '"+"value"+"'"};
if(vErrors === null){
vErrors = [err0];
}
else {
vErrors.push(err0);
}
errors++;
}
for(const key0 in data){
if(!((((key0 === "value") || (key0 === "unit")) || (key0 === "kind")) || (key0 === "relative"))){
const err1 = {instancePath,schemaPath:"#/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key0},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err1];
}
else {
vErrors.push(err1);
}
errors++;
}
}
if(data.value !== undefined){
let data0 = data.value;
if((typeof data0 == "number") && (isFinite(data0))){
if(data0 <= 0 || isNaN(data0)){
const err2 = {instancePath:instancePath+"/value",schemaPath:"#/properties/value/exclusiveMinimum",keyword:"exclusiveMinimum",params:{comparison: ">", limit: 0},message:"must be > 0"};
if(vErrors === null){
vErrors = [err2];
}
else {
vErrors.push(err2);
}
errors++;
}
}
else {
const err3 = {instancePath:instancePath+"/value",schemaPath:"#/properties/value/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err3];
}
else {
vErrors.push(err3);
}
errors++;
}
}
if(data.unit !== undefined){
let data1 = data.unit;
if(typeof data1 === "string"){
if(!pattern4.test(data1)){
const err4 = {instancePath:instancePath+"/unit",schemaPath:"#/properties/unit/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err4];
}
else {
vErrors.push(err4);
}
errors++;
}
}
else {
const err5 = {instancePath:instancePath+"/unit",schemaPath:"#/properties/unit/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err5];
}
else {
vErrors.push(err5);
}
errors++;
}
}
if(data.kind !== undefined){
let data2 = data.kind;
if(!((((data2 === "standard") || (data2 === "expanded")) || (data2 === "range")) || (data2 === "standard deviation"))){
const err6 = {instancePath:instancePath+"/kind",schemaPath:"#/properties/kind/enum",keyword:"enum",params:{allowedValues: schema29.properties.kind.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err6];
}
else {
vErrors.push(err6);
}
errors++;
}
}
if(data.relative !== undefined){
if(typeof data.relative !== "boolean"){
const err7 = {instancePath:instancePath+"/relative",schemaPath:"#/properties/relative/type",keyword:"type",params:{type: "boolean"},message:"must be boolean"};
if(vErrors === null){
vErrors = [err7];
}
else {
vErrors.push(err7);
}
errors++;
}
}
}
else {
const err8 = {instancePath,schemaPath:"#/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err8];
}
else {
vErrors.push(err8);
}
errors++;
}
validate110.errors = vErrors;
return errors === 0;
}
validate110.evaluated = {"props":true,"dynamicProps":false,"dynamicItems":false};


function validate106(data, {instancePath="", parentData, parentDataProperty, rootData=data, dynamicAnchors={}}={}){
let vErrors = null;
let errors = 0;
const evaluated0 = validate106.evaluated;
if(evaluated0.dynamicProps){
evaluated0.props = undefined;
}
if(evaluated0.dynamicItems){
evaluated0.items = undefined;
}
if(data && typeof data == "object" && !Array.isArray(data)){
for(const key0 in data){
if(!(func1.call(schema27.properties, key0))){
const err0 = {instancePath,schemaPath:"#/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key0},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err0];
}
else {
vErrors.push(err0);
}
errors++;
}
}
if(data.solute !== undefined){
let data0 = data.solute;
if(typeof data0 === "string"){
if(!pattern4.test(data0)){
const err1 = {instancePath:instancePath+"/solute",schemaPath:"#/properties/solute/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err1];
}
else {
vErrors.push(err1);
}
errors++;
}
}
else {
const err2 = {instancePath:instancePath+"/solute",schemaPath:"#/properties/solute/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err2];
}
else {
vErrors.push(err2);
}
errors++;
}
}
if(data.solvent !== undefined){
let data1 = data.solvent;
if(typeof data1 === "string"){
if(!pattern4.test(data1)){
const err3 = {instancePath:instancePath+"/solvent",schemaPath:"#/properties/solvent/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err3];
}
else {
vErrors.push(err3);
}
errors++;
}
}
else {
const err4 = {instancePath:instancePath+"/solvent",schemaPath:"#/properties/solvent/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err4];
}
else {
vErrors.push(err4);
}
errors++;
}
}
if(data.temperature !== undefined){
if(!(validate107(data.temperature, {instancePath:instancePath+"/temperature",parentData:data,parentDataProperty:"temperature",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate107.errors : vErrors.concat(validate107.errors);
errors = vErrors.length;
}
}
if(data.solubility !== undefined){
if(!(validate107(data.solubility, {instancePath:instancePath+"/solubility",parentData:data,parentDataProperty:"solubility",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate107.errors : vErrors.concat(validate107.errors);
errors = vErrors.length;
}
}
if(data.cas !== undefined){
let data4 = data.cas;
if(typeof data4 === "string"){
if(!pattern4.test(data4)){
const err5 = {instancePath:instancePath+"/cas",schemaPath:"#/properties/cas/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err5];
}
else {
vErrors.push(err5);
}
errors++;
}
}
else {
const err6 = {instancePath:instancePath+"/cas",schemaPath:"#/properties/cas/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err6];
}
else {
vErrors.push(err6);
}
errors++;
}
}
if(data.inchikey !== undefined){
let data5 = data.inchikey;
if(typeof data5 === "string"){
if(!pattern4.test(data5)){
const err7 = {instancePath:instancePath+"/inchikey",schemaPath:"#/properties/inchikey/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err7];
}
else {
vErrors.push(err7);
}
errors++;
}
}
else {
const err8 = {instancePath:instancePath+"/inchikey",schemaPath:"#/properties/inchikey/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err8];
}
else {
vErrors.push(err8);
}
errors++;
}
}
if(data.smiles !== undefined){
let data6 = data.smiles;
if(typeof data6 === "string"){
if(!pattern4.test(data6)){
const err9 = {instancePath:instancePath+"/smiles",schemaPath:"#/properties/smiles/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err9];
}
else {
vErrors.push(err9);
}
errors++;
}
}
else {
const err10 = {instancePath:instancePath+"/smiles",schemaPath:"#/properties/smiles/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err10];
}
else {
vErrors.push(err10);
}
errors++;
}
}
if(data.formula !== undefined){
let data7 = data.formula;
if(typeof data7 === "string"){
if(!pattern4.test(data7)){
const err11 = {instancePath:instancePath+"/formula",schemaPath:"#/properties/formula/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err11];
}
else {
vErrors.push(err11);
}
errors++;
}
}
else {
const err12 = {instancePath:instancePath+"/formula",schemaPath:"#/properties/formula/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err12];
}
else {
vErrors.push(err12);
}
errors++;
}
}
if(data.molar_mass !== undefined){
let data8 = data.molar_mass;
if(!((typeof data8 == "number") && (isFinite(data8)))){
const err13 = {instancePath:instancePath+"/molar_mass",schemaPath:"#/properties/molar_mass/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err13];
}
else {
vErrors.push(err13);
}
errors++;
}
}
if(data.solid_form !== undefined){
let data9 = data.solid_form;
if(typeof data9 === "string"){
if(!pattern4.test(data9)){
const err14 = {instancePath:instancePath+"/solid_form",schemaPath:"#/properties/solid_form/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err14];
}
else {
vErrors.push(err14);
}
errors++;
}
}
else {
const err15 = {instancePath:instancePath+"/solid_form",schemaPath:"#/properties/solid_form/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err15];
}
else {
vErrors.push(err15);
}
errors++;
}
}
if(data.solute_basis !== undefined){
let data10 = data.solute_basis;
if(!(((data10 === "anhydrous") || (data10 === "hydrate per added solvent")) || (data10 === "hydrate equivalent per total solvent"))){
const err16 = {instancePath:instancePath+"/solute_basis",schemaPath:"#/properties/solute_basis/enum",keyword:"enum",params:{allowedValues: schema27.properties.solute_basis.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err16];
}
else {
vErrors.push(err16);
}
errors++;
}
}
if(data.composition !== undefined){
let data11 = data.composition;
if((typeof data11 !== "string") && (!((typeof data11 == "number") && (isFinite(data11))))){
const err17 = {instancePath:instancePath+"/composition",schemaPath:"#/properties/composition/type",keyword:"type",params:{type: schema27.properties.composition.type},message:"must be string,number"};
if(vErrors === null){
vErrors = [err17];
}
else {
vErrors.push(err17);
}
errors++;
}
}
if(data.composition_basis !== undefined){
let data12 = data.composition_basis;
if(typeof data12 === "string"){
if(!pattern4.test(data12)){
const err18 = {instancePath:instancePath+"/composition_basis",schemaPath:"#/properties/composition_basis/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err18];
}
else {
vErrors.push(err18);
}
errors++;
}
}
else {
const err19 = {instancePath:instancePath+"/composition_basis",schemaPath:"#/properties/composition_basis/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err19];
}
else {
vErrors.push(err19);
}
errors++;
}
}
if(data.solvent_grade !== undefined){
let data13 = data.solvent_grade;
if(typeof data13 === "string"){
if(!pattern4.test(data13)){
const err20 = {instancePath:instancePath+"/solvent_grade",schemaPath:"#/properties/solvent_grade/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err20];
}
else {
vErrors.push(err20);
}
errors++;
}
}
else {
const err21 = {instancePath:instancePath+"/solvent_grade",schemaPath:"#/properties/solvent_grade/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err21];
}
else {
vErrors.push(err21);
}
errors++;
}
}
if(data.solvent_water_wt_percent !== undefined){
let data14 = data.solvent_water_wt_percent;
if(!((typeof data14 == "number") && (isFinite(data14)))){
const err22 = {instancePath:instancePath+"/solvent_water_wt_percent",schemaPath:"#/properties/solvent_water_wt_percent/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err22];
}
else {
vErrors.push(err22);
}
errors++;
}
}
if(data.medium !== undefined){
let data15 = data.medium;
if(typeof data15 === "string"){
if(!pattern4.test(data15)){
const err23 = {instancePath:instancePath+"/medium",schemaPath:"#/properties/medium/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err23];
}
else {
vErrors.push(err23);
}
errors++;
}
}
else {
const err24 = {instancePath:instancePath+"/medium",schemaPath:"#/properties/medium/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err24];
}
else {
vErrors.push(err24);
}
errors++;
}
}
if(data.pH_final !== undefined){
let data16 = data.pH_final;
if(!((typeof data16 == "number") && (isFinite(data16)))){
const err25 = {instancePath:instancePath+"/pH_final",schemaPath:"#/properties/pH_final/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err25];
}
else {
vErrors.push(err25);
}
errors++;
}
}
if(data.stereo !== undefined){
let data17 = data.stereo;
if(typeof data17 === "string"){
if(!pattern4.test(data17)){
const err26 = {instancePath:instancePath+"/stereo",schemaPath:"#/properties/stereo/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err26];
}
else {
vErrors.push(err26);
}
errors++;
}
}
else {
const err27 = {instancePath:instancePath+"/stereo",schemaPath:"#/properties/stereo/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err27];
}
else {
vErrors.push(err27);
}
errors++;
}
}
if(data.lot !== undefined){
let data18 = data.lot;
if(typeof data18 === "string"){
if(!pattern4.test(data18)){
const err28 = {instancePath:instancePath+"/lot",schemaPath:"#/properties/lot/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err28];
}
else {
vErrors.push(err28);
}
errors++;
}
}
else {
const err29 = {instancePath:instancePath+"/lot",schemaPath:"#/properties/lot/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err29];
}
else {
vErrors.push(err29);
}
errors++;
}
}
if(data.solute_purity !== undefined){
let data19 = data.solute_purity;
if((typeof data19 !== "string") && (!((typeof data19 == "number") && (isFinite(data19))))){
const err30 = {instancePath:instancePath+"/solute_purity",schemaPath:"#/properties/solute_purity/type",keyword:"type",params:{type: schema27.properties.solute_purity.type},message:"must be string,number"};
if(vErrors === null){
vErrors = [err30];
}
else {
vErrors.push(err30);
}
errors++;
}
}
if(data.uncertainty !== undefined){
if(!(validate110(data.uncertainty, {instancePath:instancePath+"/uncertainty",parentData:data,parentDataProperty:"uncertainty",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate110.errors : vErrors.concat(validate110.errors);
errors = vErrors.length;
}
}
if(data.coverage_factor !== undefined){
let data21 = data.coverage_factor;
if(!((typeof data21 == "number") && (isFinite(data21)))){
const err31 = {instancePath:instancePath+"/coverage_factor",schemaPath:"#/properties/coverage_factor/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err31];
}
else {
vErrors.push(err31);
}
errors++;
}
}
if(data.n !== undefined){
let data22 = data.n;
if(!((typeof data22 == "number") && (isFinite(data22)))){
const err32 = {instancePath:instancePath+"/n",schemaPath:"#/properties/n/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err32];
}
else {
vErrors.push(err32);
}
errors++;
}
}
if(data.temperature_uncertainty !== undefined){
if(!(validate107(data.temperature_uncertainty, {instancePath:instancePath+"/temperature_uncertainty",parentData:data,parentDataProperty:"temperature_uncertainty",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate107.errors : vErrors.concat(validate107.errors);
errors = vErrors.length;
}
}
if(data.temperature_probe !== undefined){
let data24 = data.temperature_probe;
if(!(((data24 === "solution") || (data24 === "bath")) || (data24 === "jacket"))){
const err33 = {instancePath:instancePath+"/temperature_probe",schemaPath:"#/properties/temperature_probe/enum",keyword:"enum",params:{allowedValues: schema27.properties.temperature_probe.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err33];
}
else {
vErrors.push(err33);
}
errors++;
}
}
if(data.solution_density !== undefined){
if(!(validate107(data.solution_density, {instancePath:instancePath+"/solution_density",parentData:data,parentDataProperty:"solution_density",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate107.errors : vErrors.concat(validate107.errors);
errors = vErrors.length;
}
}
if(data.volume_temperature !== undefined){
if(!(validate107(data.volume_temperature, {instancePath:instancePath+"/volume_temperature",parentData:data,parentDataProperty:"volume_temperature",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate107.errors : vErrors.concat(validate107.errors);
errors = vErrors.length;
}
}
if(data.equilibration_h !== undefined){
let data27 = data.equilibration_h;
if(!((typeof data27 == "number") && (isFinite(data27)))){
const err34 = {instancePath:instancePath+"/equilibration_h",schemaPath:"#/properties/equilibration_h/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err34];
}
else {
vErrors.push(err34);
}
errors++;
}
}
if(data.approach !== undefined){
let data28 = data.approach;
if(!(((((data28 === "from below") || (data28 === "from above")) || (data28 === "both")) || (data28 === "heating to clear")) || (data28 === "cooling to cloud"))){
const err35 = {instancePath:instancePath+"/approach",schemaPath:"#/properties/approach/enum",keyword:"enum",params:{allowedValues: schema27.properties.approach.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err35];
}
else {
vErrors.push(err35);
}
errors++;
}
}
if(data.heating_rate_K_per_min !== undefined){
let data29 = data.heating_rate_K_per_min;
if(!((typeof data29 == "number") && (isFinite(data29)))){
const err36 = {instancePath:instancePath+"/heating_rate_K_per_min",schemaPath:"#/properties/heating_rate_K_per_min/type",keyword:"type",params:{type: "number"},message:"must be number"};
if(vErrors === null){
vErrors = [err36];
}
else {
vErrors.push(err36);
}
errors++;
}
}
if(data.filter_temperature !== undefined){
if(!(validate107(data.filter_temperature, {instancePath:instancePath+"/filter_temperature",parentData:data,parentDataProperty:"filter_temperature",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate107.errors : vErrors.concat(validate107.errors);
errors = vErrors.length;
}
}
if(data.excess_solid !== undefined){
let data31 = data.excess_solid;
if(!(((data31 === "yes") || (data31 === "no")) || (data31 === "unknown"))){
const err37 = {instancePath:instancePath+"/excess_solid",schemaPath:"#/properties/excess_solid/enum",keyword:"enum",params:{allowedValues: schema27.properties.excess_solid.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err37];
}
else {
vErrors.push(err37);
}
errors++;
}
}
if(data.solid_before !== undefined){
let data32 = data.solid_before;
if(typeof data32 === "string"){
if(!pattern4.test(data32)){
const err38 = {instancePath:instancePath+"/solid_before",schemaPath:"#/properties/solid_before/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err38];
}
else {
vErrors.push(err38);
}
errors++;
}
}
else {
const err39 = {instancePath:instancePath+"/solid_before",schemaPath:"#/properties/solid_before/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err39];
}
else {
vErrors.push(err39);
}
errors++;
}
}
if(data.solid_after !== undefined){
let data33 = data.solid_after;
if(typeof data33 === "string"){
if(!pattern4.test(data33)){
const err40 = {instancePath:instancePath+"/solid_after",schemaPath:"#/properties/solid_after/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err40];
}
else {
vErrors.push(err40);
}
errors++;
}
}
else {
const err41 = {instancePath:instancePath+"/solid_after",schemaPath:"#/properties/solid_after/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err41];
}
else {
vErrors.push(err41);
}
errors++;
}
}
if(data.solid_check !== undefined){
let data34 = data.solid_check;
if(!((((((data34 === "none") || (data34 === "XRPD")) || (data34 === "Raman")) || (data34 === "DSC")) || (data34 === "TGA")) || (data34 === "Karl Fischer"))){
const err42 = {instancePath:instancePath+"/solid_check",schemaPath:"#/properties/solid_check/enum",keyword:"enum",params:{allowedValues: schema27.properties.solid_check.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err42];
}
else {
vErrors.push(err42);
}
errors++;
}
}
if(data.drying !== undefined){
let data35 = data.drying;
if(typeof data35 === "string"){
if(!pattern4.test(data35)){
const err43 = {instancePath:instancePath+"/drying",schemaPath:"#/properties/drying/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err43];
}
else {
vErrors.push(err43);
}
errors++;
}
}
else {
const err44 = {instancePath:instancePath+"/drying",schemaPath:"#/properties/drying/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err44];
}
else {
vErrors.push(err44);
}
errors++;
}
}
if(data.assay_after !== undefined){
let data36 = data.assay_after;
if((typeof data36 !== "string") && (!((typeof data36 == "number") && (isFinite(data36))))){
const err45 = {instancePath:instancePath+"/assay_after",schemaPath:"#/properties/assay_after/type",keyword:"type",params:{type: schema27.properties.assay_after.type},message:"must be string,number"};
if(vErrors === null){
vErrors = [err45];
}
else {
vErrors.push(err45);
}
errors++;
}
}
if(data.method !== undefined){
let data37 = data.method;
if(!((((((((((data37 === "gravimetric") || (data37 === "titration")) || (data37 === "hplc")) || (data37 === "uv")) || (data37 === "refractive-index")) || (data37 === "isothermal-synthetic")) || (data37 === "clear-point")) || (data37 === "cloud-point")) || (data37 === "kinetic-from-stock")) || (data37 === "unspecified"))){
const err46 = {instancePath:instancePath+"/method",schemaPath:"#/properties/method/enum",keyword:"enum",params:{allowedValues: schema27.properties.method.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err46];
}
else {
vErrors.push(err46);
}
errors++;
}
}
if(data.replicate !== undefined){
let data38 = data.replicate;
if((typeof data38 !== "string") && (!((typeof data38 == "number") && (isFinite(data38))))){
const err47 = {instancePath:instancePath+"/replicate",schemaPath:"#/properties/replicate/type",keyword:"type",params:{type: schema27.properties.replicate.type},message:"must be string,number"};
if(vErrors === null){
vErrors = [err47];
}
else {
vErrors.push(err47);
}
errors++;
}
}
if(data.measured_on !== undefined){
let data39 = data.measured_on;
if(typeof data39 === "string"){
if(!pattern4.test(data39)){
const err48 = {instancePath:instancePath+"/measured_on",schemaPath:"#/properties/measured_on/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err48];
}
else {
vErrors.push(err48);
}
errors++;
}
}
else {
const err49 = {instancePath:instancePath+"/measured_on",schemaPath:"#/properties/measured_on/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err49];
}
else {
vErrors.push(err49);
}
errors++;
}
}
if(data.reference !== undefined){
let data40 = data.reference;
if(typeof data40 === "string"){
if(!pattern4.test(data40)){
const err50 = {instancePath:instancePath+"/reference",schemaPath:"#/properties/reference/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err50];
}
else {
vErrors.push(err50);
}
errors++;
}
}
else {
const err51 = {instancePath:instancePath+"/reference",schemaPath:"#/properties/reference/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err51];
}
else {
vErrors.push(err51);
}
errors++;
}
}
if(data.doi !== undefined){
let data41 = data.doi;
if(typeof data41 === "string"){
if(!pattern4.test(data41)){
const err52 = {instancePath:instancePath+"/doi",schemaPath:"#/properties/doi/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err52];
}
else {
vErrors.push(err52);
}
errors++;
}
}
else {
const err53 = {instancePath:instancePath+"/doi",schemaPath:"#/properties/doi/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err53];
}
else {
vErrors.push(err53);
}
errors++;
}
}
if(data.note !== undefined){
let data42 = data.note;
if(typeof data42 === "string"){
if(!pattern4.test(data42)){
const err54 = {instancePath:instancePath+"/note",schemaPath:"#/properties/note/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err54];
}
else {
vErrors.push(err54);
}
errors++;
}
}
else {
const err55 = {instancePath:instancePath+"/note",schemaPath:"#/properties/note/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err55];
}
else {
vErrors.push(err55);
}
errors++;
}
}
}
else {
const err56 = {instancePath,schemaPath:"#/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err56];
}
else {
vErrors.push(err56);
}
errors++;
}
validate106.errors = vErrors;
return errors === 0;
}
validate106.evaluated = {"props":true,"dynamicProps":false,"dynamicItems":false};


function validate55(data, {instancePath="", parentData, parentDataProperty, rootData=data, dynamicAnchors={}}={}){
/*# sourceURL="source-card.schema.json" */;
let vErrors = null;
let errors = 0;
const evaluated0 = validate55.evaluated;
if(evaluated0.dynamicProps){
evaluated0.props = undefined;
}
if(evaluated0.dynamicItems){
evaluated0.items = undefined;
}
if(data && typeof data == "object" && !Array.isArray(data)){
if(data.format === undefined){
const err0 = {instancePath,schemaPath:"#/required",keyword:"required",params:{missingProperty: "format"},message:"must have required property '"+"format"+"'"};
if(vErrors === null){
vErrors = [err0];
}
else {
vErrors.push(err0);
}
errors++;
}
if(data.source === undefined){
const err1 = {instancePath,schemaPath:"#/required",keyword:"required",params:{missingProperty: "source"},message:"must have required property '"+"source"+"'"};
if(vErrors === null){
vErrors = [err1];
}
else {
vErrors.push(err1);
}
errors++;
}
if(data.file === undefined){
const err2 = {instancePath,schemaPath:"#/required",keyword:"required",params:{missingProperty: "file"},message:"must have required property '"+"file"+"'"};
if(vErrors === null){
vErrors = [err2];
}
else {
vErrors.push(err2);
}
errors++;
}
if(data.columns === undefined){
const err3 = {instancePath,schemaPath:"#/required",keyword:"required",params:{missingProperty: "columns"},message:"must have required property '"+"columns"+"'"};
if(vErrors === null){
vErrors = [err3];
}
else {
vErrors.push(err3);
}
errors++;
}
for(const key0 in data){
if(!(func1.call(schema21.properties, key0))){
const err4 = {instancePath,schemaPath:"#/additionalProperties",keyword:"additionalProperties",params:{additionalProperty: key0},message:"must NOT have additional properties"};
if(vErrors === null){
vErrors = [err4];
}
else {
vErrors.push(err4);
}
errors++;
}
}
if(data.$schema !== undefined){
if(typeof data.$schema !== "string"){
const err5 = {instancePath:instancePath+"/$schema",schemaPath:"#/properties/%24schema/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err5];
}
else {
vErrors.push(err5);
}
errors++;
}
}
if(data.format !== undefined){
if(1 !== data.format){
const err6 = {instancePath:instancePath+"/format",schemaPath:"#/properties/format/const",keyword:"const",params:{allowedValue: 1},message:"must be equal to constant"};
if(vErrors === null){
vErrors = [err6];
}
else {
vErrors.push(err6);
}
errors++;
}
}
if(data.source !== undefined){
let data2 = data.source;
if(typeof data2 === "string"){
if(!pattern3.test(data2)){
const err7 = {instancePath:instancePath+"/source",schemaPath:"#/properties/source/pattern",keyword:"pattern",params:{pattern: "^[a-z0-9][a-z0-9-]{0,63}$"},message:"must match pattern \""+"^[a-z0-9][a-z0-9-]{0,63}$"+"\""};
if(vErrors === null){
vErrors = [err7];
}
else {
vErrors.push(err7);
}
errors++;
}
}
else {
const err8 = {instancePath:instancePath+"/source",schemaPath:"#/properties/source/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err8];
}
else {
vErrors.push(err8);
}
errors++;
}
}
if(data.title !== undefined){
let data3 = data.title;
if((typeof data3 !== "string") && (data3 !== null)){
const err9 = {instancePath:instancePath+"/title",schemaPath:"#/properties/title/type",keyword:"type",params:{type: schema21.properties.title.type},message:"must be string,null"};
if(vErrors === null){
vErrors = [err9];
}
else {
vErrors.push(err9);
}
errors++;
}
}
if(data.origin !== undefined){
let data4 = data.origin;
if(!((((data4 === "laboratory") || (data4 === "literature")) || (data4 === "open-dataset")) || (data4 === "handbook"))){
const err10 = {instancePath:instancePath+"/origin",schemaPath:"#/properties/origin/enum",keyword:"enum",params:{allowedValues: schema21.properties.origin.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err10];
}
else {
vErrors.push(err10);
}
errors++;
}
}
if(data.reported_by !== undefined){
let data5 = data.reported_by;
if((typeof data5 !== "string") && (data5 !== null)){
const err11 = {instancePath:instancePath+"/reported_by",schemaPath:"#/properties/reported_by/type",keyword:"type",params:{type: schema21.properties.reported_by.type},message:"must be string,null"};
if(vErrors === null){
vErrors = [err11];
}
else {
vErrors.push(err11);
}
errors++;
}
}
if(data.laboratory !== undefined){
let data6 = data.laboratory;
if((typeof data6 !== "string") && (data6 !== null)){
const err12 = {instancePath:instancePath+"/laboratory",schemaPath:"#/properties/laboratory/type",keyword:"type",params:{type: schema21.properties.laboratory.type},message:"must be string,null"};
if(vErrors === null){
vErrors = [err12];
}
else {
vErrors.push(err12);
}
errors++;
}
}
if(data.date !== undefined){
let data7 = data.date;
if((typeof data7 !== "string") && (data7 !== null)){
const err13 = {instancePath:instancePath+"/date",schemaPath:"#/properties/date/type",keyword:"type",params:{type: schema21.properties.date.type},message:"must be string,null"};
if(vErrors === null){
vErrors = [err13];
}
else {
vErrors.push(err13);
}
errors++;
}
if(typeof data7 === "string"){
if(!pattern6.test(data7)){
const err14 = {instancePath:instancePath+"/date",schemaPath:"#/properties/date/pattern",keyword:"pattern",params:{pattern: "^[0-9]{4}(-(0[1-9]|1[0-2])(-(0[1-9]|[12][0-9]|3[01]))?)?$"},message:"must match pattern \""+"^[0-9]{4}(-(0[1-9]|1[0-2])(-(0[1-9]|[12][0-9]|3[01]))?)?$"+"\""};
if(vErrors === null){
vErrors = [err14];
}
else {
vErrors.push(err14);
}
errors++;
}
}
}
if(data.reference !== undefined){
let data8 = data.reference;
if((typeof data8 !== "string") && (data8 !== null)){
const err15 = {instancePath:instancePath+"/reference",schemaPath:"#/properties/reference/type",keyword:"type",params:{type: schema21.properties.reference.type},message:"must be string,null"};
if(vErrors === null){
vErrors = [err15];
}
else {
vErrors.push(err15);
}
errors++;
}
}
if(data.doi !== undefined){
let data9 = data.doi;
if((typeof data9 !== "string") && (data9 !== null)){
const err16 = {instancePath:instancePath+"/doi",schemaPath:"#/properties/doi/type",keyword:"type",params:{type: schema21.properties.doi.type},message:"must be string,null"};
if(vErrors === null){
vErrors = [err16];
}
else {
vErrors.push(err16);
}
errors++;
}
if(typeof data9 === "string"){
if(!pattern7.test(data9)){
const err17 = {instancePath:instancePath+"/doi",schemaPath:"#/properties/doi/pattern",keyword:"pattern",params:{pattern: "^10\\.[0-9]{4,9}/[^\\s]+$"},message:"must match pattern \""+"^10\\.[0-9]{4,9}/[^\\s]+$"+"\""};
if(vErrors === null){
vErrors = [err17];
}
else {
vErrors.push(err17);
}
errors++;
}
}
}
if(data.licence !== undefined){
let data10 = data.licence;
if((typeof data10 !== "string") && (data10 !== null)){
const err18 = {instancePath:instancePath+"/licence",schemaPath:"#/properties/licence/type",keyword:"type",params:{type: schema21.properties.licence.type},message:"must be string,null"};
if(vErrors === null){
vErrors = [err18];
}
else {
vErrors.push(err18);
}
errors++;
}
}
if(data.method !== undefined){
let data11 = data.method;
if(!((((((((((data11 === "gravimetric") || (data11 === "titration")) || (data11 === "hplc")) || (data11 === "uv")) || (data11 === "refractive-index")) || (data11 === "isothermal-synthetic")) || (data11 === "clear-point")) || (data11 === "cloud-point")) || (data11 === "kinetic-from-stock")) || (data11 === "unspecified"))){
const err19 = {instancePath:instancePath+"/method",schemaPath:"#/properties/method/enum",keyword:"enum",params:{allowedValues: schema21.properties.method.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err19];
}
else {
vErrors.push(err19);
}
errors++;
}
}
if(data.file !== undefined){
let data12 = data.file;
if(typeof data12 === "string"){
if(!pattern4.test(data12)){
const err20 = {instancePath:instancePath+"/file",schemaPath:"#/properties/file/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err20];
}
else {
vErrors.push(err20);
}
errors++;
}
}
else {
const err21 = {instancePath:instancePath+"/file",schemaPath:"#/properties/file/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err21];
}
else {
vErrors.push(err21);
}
errors++;
}
}
if(data.shape !== undefined){
if(!(data.shape === "long")){
const err22 = {instancePath:instancePath+"/shape",schemaPath:"#/properties/shape/enum",keyword:"enum",params:{allowedValues: schema21.properties.shape.enum},message:"must be equal to one of the allowed values"};
if(vErrors === null){
vErrors = [err22];
}
else {
vErrors.push(err22);
}
errors++;
}
}
if(data.table !== undefined){
if(!(validate56(data.table, {instancePath:instancePath+"/table",parentData:data,parentDataProperty:"table",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate56.errors : vErrors.concat(validate56.errors);
errors = vErrors.length;
}
}
if(data.columns !== undefined){
if(!(validate58(data.columns, {instancePath:instancePath+"/columns",parentData:data,parentDataProperty:"columns",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate58.errors : vErrors.concat(validate58.errors);
errors = vErrors.length;
}
}
if(data.constants !== undefined){
if(!(validate106(data.constants, {instancePath:instancePath+"/constants",parentData:data,parentDataProperty:"constants",rootData,dynamicAnchors}))){
vErrors = vErrors === null ? validate106.errors : vErrors.concat(validate106.errors);
errors = vErrors.length;
}
}
if(data.carry !== undefined){
let data17 = data.carry;
if(Array.isArray(data17)){
const len0 = data17.length;
for(let i0=0; i0<len0; i0++){
let data18 = data17[i0];
if(typeof data18 === "string"){
if(!pattern4.test(data18)){
const err23 = {instancePath:instancePath+"/carry/" + i0,schemaPath:"#/properties/carry/items/pattern",keyword:"pattern",params:{pattern: "\\S"},message:"must match pattern \""+"\\S"+"\""};
if(vErrors === null){
vErrors = [err23];
}
else {
vErrors.push(err23);
}
errors++;
}
}
else {
const err24 = {instancePath:instancePath+"/carry/" + i0,schemaPath:"#/properties/carry/items/type",keyword:"type",params:{type: "string"},message:"must be string"};
if(vErrors === null){
vErrors = [err24];
}
else {
vErrors.push(err24);
}
errors++;
}
}
let i1 = data17.length;
let j0;
if(i1 > 1){
const indices0 = {};
for(;i1--;){
let item0 = data17[i1];
if(typeof item0 !== "string"){
continue;
}
if(typeof indices0[item0] == "number"){
j0 = indices0[item0];
const err25 = {instancePath:instancePath+"/carry",schemaPath:"#/properties/carry/uniqueItems",keyword:"uniqueItems",params:{i: i1, j: j0},message:"must NOT have duplicate items (items ## "+j0+" and "+i1+" are identical)"};
if(vErrors === null){
vErrors = [err25];
}
else {
vErrors.push(err25);
}
errors++;
break;
}
indices0[item0] = i1;
}
}
}
else {
const err26 = {instancePath:instancePath+"/carry",schemaPath:"#/properties/carry/type",keyword:"type",params:{type: "array"},message:"must be array"};
if(vErrors === null){
vErrors = [err26];
}
else {
vErrors.push(err26);
}
errors++;
}
}
}
else {
const err27 = {instancePath,schemaPath:"#/type",keyword:"type",params:{type: "object"},message:"must be object"};
if(vErrors === null){
vErrors = [err27];
}
else {
vErrors.push(err27);
}
errors++;
}
validate55.errors = vErrors;
return errors === 0;
}
validate55.evaluated = {"props":true,"dynamicProps":false,"dynamicItems":false};

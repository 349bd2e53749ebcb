/** Made from openapi.json by npm run openapi: for a typed client, such as openapi-fetch. */
export interface paths {
    "/": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Show all segments on a plan, coloured and labelled by recommended speed. */
        get: operations["getOverview"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/health/live": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Tell whether the process answers. */
        get: operations["getLive"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/health/ready": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Tell whether the service can answer, and from which versions. */
        get: operations["getReady"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/metrics": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Give the figures of this process in the text form of Prometheus. */
        get: operations["getMetrics"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/openapi.json": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Describe this interface as an OpenAPI 3.1 document. */
        get: operations["getOpenApi"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/advisories": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        get?: never;
        put?: never;
        /**
         * Recommend a maximum speed for a vessel on a segment.
         * @description The largest speed at which every criterion holds on the whole way up from rest. Every default that was used is in `assumptions`; `cautions` always defers to local rules and licensed practice.
         */
        post: operations["createAdvisory"];
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/advisories.geojson": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /**
         * Show the advisories of all segments for a class of vessels as a map layer.
         * @description A segment that cannot be answered is a feature with `problem_code`, never a failed layer.
         */
        get: operations["getAdvisoryLayer"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/advisories/inverse": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        get?: never;
        put?: never;
        /** Tell the least depth or bank distance, or the greatest draught, that a speed needs. */
        post: operations["createInverse"];
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/advisories/matrix": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        get?: never;
        put?: never;
        /**
         * Answer every segment with every vessel in all conditions, as rows.
         * @description Segments outermost, conditions innermost. A cell that cannot be answered is a row with `problem_code`.
         */
        post: operations["createAdvisoryMatrix"];
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/advisories/sensitivity": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        get?: never;
        put?: never;
        /** Tell which uncertain input moves a recommendation most. */
        post: operations["createSensitivity"];
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/advisories/stream": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        get?: never;
        put?: never;
        /**
         * Answer a stream of advisory requests, line by line, in their order.
         * @description NDJSON or CSV in, NDJSON or CSV out. Each line in has one line out: an advisory or a problem with its line number. One bad line never ends the stream.
         */
        post: operations["streamAdvisories"];
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/calibrations": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** List the calibrations, without their rows. */
        get: operations["listCalibrations"];
        put?: never;
        /**
         * Correct the wave-height methods of one water by measured waves.
         * @description From 5 to 10,000 passages of vessels with the highest wave at a gauge. Each method gets the factor by which it is off, with how sure that is. On a segment, a passage counts at the station whose depth is nearest, at the water level that gives the depth of the row; a width of the row makes a section of its own. Without a segment, a width makes the water confined, and without one it is open. NDJSON and CSV carry the rows, a passage each, and the query the rest.
         */
        post: operations["createCalibration"];
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/calibrations/{id}": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Show a calibration with the passages it was made from. */
        get: operations["getCalibration"];
        put?: never;
        post?: never;
        /** Delete a calibration that no segment names. */
        delete: operations["deleteCalibration"];
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/calibrations/{id}/fit": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Draw measured over computed wave heights of a method. */
        get: operations["getCalibrationFit"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/calibrations/{id}/residuals": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Draw what the factor of a method leaves unexplained. */
        get: operations["getCalibrationResiduals"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/calibrations/{id}/sheet": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Show a calibration as a page to read and to print on A4. */
        get: operations["getCalibrationSheet"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/effects": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        get?: never;
        put?: never;
        /** Tell what a passage at a given speed does, and whether it is faster than advised. */
        post: operations["createEffects"];
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/limit-plans": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** List the limit plans. */
        get: operations["listLimitPlans"];
        put?: never;
        /**
         * Draw limits for groups of vessels from a study that has succeeded.
         * @description The ceiling of a segment is the lowest maximum over the vessels of a group, levels, currents and directions, rounded down to the step of the sign. Limits are constant over stretches of consecutive segments; of all limits that exceed no ceiling and keep the run length, those with the least travel time are taken, then those with the fewest stretches, then the highest from upstream. A cell that cannot be, or has no safe speed, leaves its segment without a limit.
         */
        post: operations["createLimitPlan"];
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/limit-plans/{id}": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Show a limit plan, as JSON, on the map, or as a table. */
        get: operations["getLimitPlan"];
        put?: never;
        post?: never;
        /** Delete a draft; published plans stay. */
        delete: operations["deleteLimitPlan"];
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/limit-plans/{id}/evidence": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Show the evidence of a plan as pages to read and to print on A4. */
        get: operations["getLimitPlanEvidence"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/limit-plans/{id}/notice": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Give the limits of a plan in code words of notices, as a proposal. */
        get: operations["getLimitPlanNotice"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/limit-plans/{id}/publish": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        get?: never;
        put?: never;
        /**
         * Publish a plan: it is numbered, dated and frozen with everything it rests on.
         * @description Needs a key that may publish. Nothing changes a published plan but another that supersedes it. The same request again gives the same answer.
         */
        post: operations["publishLimitPlan"];
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/limit-plans/{id}/record": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /**
         * Give a plan with everything it rests on as one document.
         * @description Of a published plan, as it was frozen. `npm run verify -- record.json` recomputes it without a database.
         */
        get: operations["getLimitPlanRecord"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/limit-plans/{id}/verify": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Show what the latest verification of a plan found. */
        get: operations["getLimitPlanVerification"];
        put?: never;
        /**
         * Recompute a plan from its record, in the background.
         * @description Ask `GET /v1/limit-plans/{id}/verify` for what was found.
         */
        post: operations["verifyLimitPlan"];
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/methods": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** List the published methods behind the figures, with their ranges. */
        get: operations["listMethods"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/methods/{id}": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Show a published method. */
        get: operations["getMethod"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/passages/check": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        get?: never;
        put?: never;
        /**
         * Check a log of position reports: who was faster than advisable, where, and what the banks got.
         * @description A log of AIS position reports as CSV or NDJSON, by the column names of open publications. Each report is placed on a segment and held against the recommended maximum there. With `detail=reports` there is a line for each row, in their order; events as they close; the summary last. With `events` and `summary` the reply begins after the last byte of the log. Without a summary line an answer is incomplete. CSV out holds the one table of `detail`.
         */
        post: operations["checkPassages"];
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/passages/columns": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** List the columns that a log of position reports may have, and the names they are recognised by. */
        get: operations["getPassageColumns"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/problems": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** List every kind of problem that the service answers with. */
        get: operations["listProblems"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/problems/{slug}": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Describe one kind of problem and what to do about it. */
        get: operations["getProblem"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/segments": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** List the segments of the registry. */
        get: operations["listSegments"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/segments/{id}": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Show a segment, as it is or as it was at a revision. */
        get: operations["getSegment"];
        /**
         * Create a segment, or replace one at the revision that If-Match names.
         * @description Unchanged content makes no revision. Without If-Match only a new segment is written.
         */
        put: operations["putSegment"];
        post?: never;
        /** Delete the segment at the revision that If-Match names; its revisions stay readable. */
        delete: operations["deleteSegment"];
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/segments/{id}/advisory": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /**
         * Recommend a maximum speed for a class of vessels on a registry segment.
         * @description Conditional requests are answered with 304 while nothing that the answer follows from has changed.
         */
        get: operations["getSegmentAdvisory"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/segments/{id}/revisions": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** List the changes of a segment, newest first; a deleted segment keeps them. */
        get: operations["listSegmentRevisions"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/segments/{id}/sheet": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Show the advisory of a segment as a page to read and to print on A4. */
        get: operations["getSegmentSheet"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/segments/{id}/speed-curve": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Show what a passage does over its speed, as figures or as a drawing. */
        get: operations["getSegmentSpeedCurve"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/segments/import": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        get?: never;
        put?: never;
        /**
         * Create or replace segments from a GeoJSON collection, all or nothing.
         * @description A dry run writes nothing and lists every fault with its feature.
         */
        post: operations["importSegments"];
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/studies": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** List the studies. */
        get: operations["listStudies"];
        put?: never;
        /**
         * Compute the maximum speeds of many segments and vessels, with what is uncertain about them.
         * @description The registry is read once, now: later changes of it do not reach the study. It goes on in the background, also over a restart of the service; ask for it until its state is `succeeded`, then for its results. With `uncertainty` each cell is sampled: quasi-random draws that follow from the seed, the same for every cell, so that neighbours are compared under the same surprises; normal about the value for `sd`, uniform for `half_range`; the wave height is multiplied by a log-normal factor of median 1. A draw that cannot be counts as without a safe speed.
         */
        post: operations["createStudy"];
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/studies/{id}": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Show a study and how far it is. */
        get: operations["getStudy"];
        put?: never;
        post?: never;
        /** Cancel a study that is queued or running, or delete one that has ended. */
        delete: operations["deleteStudy"];
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/studies/{id}/results": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /**
         * Give the results of a study that has succeeded, a row for each cell.
         * @description Ordered by segment, vessel, level, current and direction. A cell that cannot be is a row with `problem_code`. A percentile is interpolated between the two samples beside it; it is null where one of them has no safe speed.
         */
        get: operations["getStudyResults"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/vessel-classes": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** List the classes of vessels. */
        get: operations["listVesselClasses"];
        put?: never;
        post?: never;
        delete?: never;
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
    "/v1/vessel-classes/{id}": {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        /** Show a class of vessels. */
        get: operations["getVesselClass"];
        /** Create a class of your own, or replace one at the revision that If-Match names. */
        put: operations["putVesselClass"];
        post?: never;
        /** Delete the class of your own at the revision that If-Match names. */
        delete: operations["deleteVesselClass"];
        options?: never;
        head?: never;
        patch?: never;
        trace?: never;
    };
}
export type webhooks = Record<string, never>;
export interface components {
    schemas: {
        /** @description A recommended maximum speed with its reasons, cautions and assumptions. */
        Advisory: {
            assumptions: components["schemas"]["Assumption"][];
            /** @description only when no speed is safe */
            at_minimum_steerage_speed?: components["schemas"]["Effects"];
            at_recommended_speed?: components["schemas"]["Effects"];
            /** @description with a current */
            by_direction?: {
                downstream: {
                    /** @enum {string} */
                    governing_criterion: "critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed";
                    /** @enum {string} */
                    outcome: "limited" | "service-speed" | "no-safe-speed";
                    recommended_max_speed?: components["schemas"]["SpeedPair"];
                };
                upstream: {
                    /** @enum {string} */
                    governing_criterion: "critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed";
                    /** @enum {string} */
                    outcome: "limited" | "service-speed" | "no-safe-speed";
                    recommended_max_speed?: components["schemas"]["SpeedPair"];
                };
            };
            cautions: components["schemas"]["Caution"][];
            conditions: {
                /** @description positive downstream, m/s */
                current_mps: number;
                /** @enum {string} */
                direction?: "upstream" | "downstream";
                /** @description above the datum, m */
                water_level_m: number;
            };
            criteria: components["schemas"]["Criterion"][];
            critical_speed: components["schemas"]["CriticalSpeed"];
            governing_at: string;
            /** @enum {string} */
            governing_criterion: "critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed";
            label?: string;
            /** @enum {string} */
            outcome: "limited" | "service-speed" | "no-safe-speed";
            /** @description left out when no speed is safe */
            recommended_max_speed?: {
                over_ground: components["schemas"]["Speed"];
                sign?: {
                    /** @enum {string} */
                    unit: "km/h" | "kn" | "mph";
                    value: number;
                };
                through_water: components["schemas"]["Speed"];
            };
            reproducibility: components["schemas"]["Reproducibility"];
            segment?: {
                id: string;
                name?: string;
                revision: number;
            };
            speed_curve?: components["schemas"]["SpeedCurve"];
            squat_methods: components["schemas"]["SquatMethodValue"][];
            /** @description that governs along a registry segment. The index counts the stations that are computed with, in the order of the sailing line: those given and of the bank lines as far as they are needed, one at each receptor with a chainage, and those put between */
            station?: {
                chainage_m?: number;
                index: number;
            };
            /** @description without the factor that was applied */
            uncalibrated?: {
                bank_wave_height_m?: number;
                /** @enum {string} */
                outcome: "limited" | "service-speed" | "no-safe-speed";
                recommended_max_speed?: components["schemas"]["SpeedPair"];
            };
            vessel: components["schemas"]["VesselUsed"];
            wave_methods: components["schemas"]["WaveMethodValue"][];
        };
        /** @description Every matching segment with its advisory in brief, not paged. */
        AdvisoryLayer: {
            features: {
                geometry: {
                    coordinates: [
                        number,
                        number
                    ][];
                    /** @constant */
                    type: "LineString";
                };
                id: string;
                properties: {
                    /** @description likewise, m */
                    bank_wave_height_m: number | null;
                    /** @description codes, joined by ; */
                    cautions: string | null;
                    /** @description at the recommended speed, or at minimum steerage */
                    critical_ratio: number | null;
                    /** @description likewise */
                    depth_froude_number: number | null;
                    direction: ("upstream" | "downstream") | null;
                    gauge_id: string | null;
                    governing_criterion: ("critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed") | null;
                    loading: ("laden" | "empty") | null;
                    /** @description km/h */
                    max_over_ground_kmh: number | null;
                    /** @description kn */
                    max_over_ground_kn: number | null;
                    /** @description m/s */
                    max_through_water_mps: number | null;
                    name: string | null;
                    outcome: ("limited" | "service-speed" | "no-safe-speed") | null;
                    /** @description whether the posted limit is above what the other criteria allow */
                    posted_limit_exceeds_computed: boolean | null;
                    /** @description that binds, over ground, km/h */
                    posted_limit_kmh: number | null;
                    problem_code: string | null;
                    problem_detail: string | null;
                    revision: number;
                    sign_unit: ("km/h" | "kn" | "mph") | null;
                    /** @description in sign_unit */
                    sign_value: number | null;
                    /** @description of the governing station, m */
                    station_chainage_m: number | null;
                    /** @description likewise, m */
                    under_keel_clearance_m: number | null;
                    vessel_class: string | null;
                    waterway: string | null;
                    worst_severity: ("info" | "caution" | "warning") | null;
                };
                /** @constant */
                type: "Feature";
            }[];
            /** @constant */
            type: "FeatureCollection";
        };
        /** @description An advisory and the line of the request that it answers. */
        AdvisoryLine: {
            assumptions: components["schemas"]["Assumption"][];
            /** @description only when no speed is safe */
            at_minimum_steerage_speed?: components["schemas"]["Effects"];
            at_recommended_speed?: components["schemas"]["Effects"];
            /** @description with a current */
            by_direction?: {
                downstream: {
                    /** @enum {string} */
                    governing_criterion: "critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed";
                    /** @enum {string} */
                    outcome: "limited" | "service-speed" | "no-safe-speed";
                    recommended_max_speed?: components["schemas"]["SpeedPair"];
                };
                upstream: {
                    /** @enum {string} */
                    governing_criterion: "critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed";
                    /** @enum {string} */
                    outcome: "limited" | "service-speed" | "no-safe-speed";
                    recommended_max_speed?: components["schemas"]["SpeedPair"];
                };
            };
            cautions: components["schemas"]["Caution"][];
            conditions: {
                /** @description positive downstream, m/s */
                current_mps: number;
                /** @enum {string} */
                direction?: "upstream" | "downstream";
                /** @description above the datum, m */
                water_level_m: number;
            };
            criteria: components["schemas"]["Criterion"][];
            critical_speed: components["schemas"]["CriticalSpeed"];
            governing_at: string;
            /** @enum {string} */
            governing_criterion: "critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed";
            label?: string;
            /** @description physical line of the body, from 1 */
            line: number;
            /** @enum {string} */
            outcome: "limited" | "service-speed" | "no-safe-speed";
            /** @description left out when no speed is safe */
            recommended_max_speed?: {
                over_ground: components["schemas"]["Speed"];
                sign?: {
                    /** @enum {string} */
                    unit: "km/h" | "kn" | "mph";
                    value: number;
                };
                through_water: components["schemas"]["Speed"];
            };
            reproducibility: components["schemas"]["Reproducibility"];
            segment?: {
                id: string;
                name?: string;
                revision: number;
            };
            speed_curve?: components["schemas"]["SpeedCurve"];
            squat_methods: components["schemas"]["SquatMethodValue"][];
            /** @description that governs along a registry segment. The index counts the stations that are computed with, in the order of the sailing line: those given and of the bank lines as far as they are needed, one at each receptor with a chainage, and those put between */
            station?: {
                chainage_m?: number;
                index: number;
            };
            /** @description without the factor that was applied */
            uncalibrated?: {
                bank_wave_height_m?: number;
                /** @enum {string} */
                outcome: "limited" | "service-speed" | "no-safe-speed";
                recommended_max_speed?: components["schemas"]["SpeedPair"];
            };
            vessel: components["schemas"]["VesselUsed"];
            wave_methods: components["schemas"]["WaveMethodValue"][];
        };
        /** @description A cell of a matrix as a flat advisory. */
        AdvisoryMatrixRow: {
            /** @description likewise, m */
            bank_wave_height_m: number | null;
            /** @description codes, joined by ; */
            cautions: string | null;
            condition_index: number;
            /** @description at the recommended speed, or at minimum steerage */
            critical_ratio: number | null;
            /** @description through the water, m/s */
            critical_speed_mps: number | null;
            /** @description positive downstream, m/s */
            current_mps: number | null;
            /** @description likewise */
            depth_froude_number: number | null;
            direction: ("upstream" | "downstream") | null;
            /** @description likewise, m */
            drawdown_m: number | null;
            governing_at: string | null;
            governing_criterion: ("critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed") | null;
            input_hash: string | null;
            label: string | null;
            loading: ("laden" | "empty") | null;
            /** @description km/h */
            max_over_ground_kmh: number | null;
            /** @description kn */
            max_over_ground_kn: number | null;
            /** @description m/s */
            max_over_ground_mps: number | null;
            /** @description m/s */
            max_through_water_mps: number | null;
            outcome: ("limited" | "service-speed" | "no-safe-speed") | null;
            problem_code: string | null;
            problem_detail: string | null;
            regime: ("subcritical" | "elevated" | "near-critical" | "supercritical" | "transcritical") | null;
            /** @description likewise, m/s */
            return_current_mps: number | null;
            segment_id: string | null;
            segment_index: number;
            sign_unit: ("km/h" | "kn" | "mph") | null;
            /** @description in sign_unit */
            sign_value: number | null;
            /** @description likewise, m */
            squat_m: number | null;
            /** @description of the governing station, m */
            station_chainage_m: number | null;
            /** @description without the factor that was applied, m/s */
            uncalibrated_max_over_ground_mps: number | null;
            /** @description likewise, m */
            under_keel_clearance_m: number | null;
            vessel_class: string | null;
            vessel_index: number;
            /** @description m */
            water_level_m: number | null;
        };
        /** @description A segment and a vessel, with the conditions of the moment. */
        AdvisoryRequest: {
            conditions?: components["schemas"]["Conditions"];
            /** @description the caller's own mark, echoed unread */
            label?: string;
            options?: components["schemas"]["Options"];
            segment: components["schemas"]["Segment"];
            vessel: components["schemas"]["Vessel"];
        };
        /** @description A flat advisory: every column present, null where it does not apply. */
        AdvisoryRow: {
            /** @description likewise, m */
            bank_wave_height_m: number | null;
            /** @description codes, joined by ; */
            cautions: string | null;
            /** @description at the recommended speed, or at minimum steerage */
            critical_ratio: number | null;
            /** @description through the water, m/s */
            critical_speed_mps: number | null;
            /** @description positive downstream, m/s */
            current_mps: number | null;
            /** @description likewise */
            depth_froude_number: number | null;
            direction: ("upstream" | "downstream") | null;
            /** @description likewise, m */
            drawdown_m: number | null;
            governing_at: string | null;
            governing_criterion: ("critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed") | null;
            input_hash: string | null;
            label: string | null;
            /** @description physical line of the body, from 1 */
            line: number;
            loading: ("laden" | "empty") | null;
            /** @description km/h */
            max_over_ground_kmh: number | null;
            /** @description kn */
            max_over_ground_kn: number | null;
            /** @description m/s */
            max_over_ground_mps: number | null;
            /** @description m/s */
            max_through_water_mps: number | null;
            outcome: ("limited" | "service-speed" | "no-safe-speed") | null;
            problem_code: string | null;
            problem_detail: string | null;
            regime: ("subcritical" | "elevated" | "near-critical" | "supercritical" | "transcritical") | null;
            /** @description likewise, m/s */
            return_current_mps: number | null;
            segment_id: string | null;
            sign_unit: ("km/h" | "kn" | "mph") | null;
            /** @description in sign_unit */
            sign_value: number | null;
            /** @description likewise, m */
            squat_m: number | null;
            /** @description of the governing station, m */
            station_chainage_m: number | null;
            /** @description without the factor that was applied, m/s */
            uncalibrated_max_over_ground_mps: number | null;
            /** @description likewise, m */
            under_keel_clearance_m: number | null;
            vessel_class: string | null;
            /** @description m */
            water_level_m: number | null;
        };
        /** @description What a speed does, and whether it is faster than advised. */
        Assessment: {
            assumptions: components["schemas"]["Assumption"][];
            cautions: components["schemas"]["Caution"][];
            conditions: {
                /** @description positive downstream, m/s */
                current_mps: number;
                /** @enum {string} */
                direction?: "upstream" | "downstream";
                /** @description above the datum, m */
                water_level_m: number;
            };
            criteria: components["schemas"]["Criterion"][];
            effects: components["schemas"]["Effects"];
            exceeded: ("critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed")[];
            label?: string;
            reproducibility: components["schemas"]["Reproducibility"];
            segment?: {
                id: string;
                name?: string;
                revision: number;
            };
            squat_methods: components["schemas"]["SquatMethodValue"][];
            /** @description that governs along a registry segment. The index counts the stations that are computed with, in the order of the sailing line: those given and of the bank lines as far as they are needed, one at each receptor with a chainage, and those put between */
            station?: {
                chainage_m?: number;
                index: number;
            };
            /** @enum {string} */
            verdict: "within" | "exceeds" | "no-safe-speed";
            vessel: components["schemas"]["VesselUsed"];
            wave_methods: components["schemas"]["WaveMethodValue"][];
        };
        /** @description A value that was not given, with where it comes from. */
        Assumption: {
            field: string;
            source: string;
            text: string;
            value: string | number | boolean;
        };
        /** @description One bank of a segment. */
        Bank: {
            /** @description sailing line to the waterline at the datum, m */
            distance_m?: number;
            /**
             * @description default unprotected
             * @enum {string}
             */
            kind?: "unprotected" | "reed" | "riprap" | "wall";
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description m */
            max_drawdown_m?: number;
            /** @description m/s */
            max_return_current_mps?: number;
            /** @description in place of the default for the kind, m */
            max_wave_height_m?: number;
            /** @description horizontal over vertical */
            slope_h_per_v?: number;
            /** @description median stone size of riprap, m */
            stone_d50_m?: number;
            /** @description (rho_s - rho)/rho of the stone, default 1.65 */
            stone_relative_density?: number;
            /** @description depth below the datum at the toe, m; limits waves by breaking */
            toe_depth_m?: number;
        };
        /** @description What the measurements say of a method. */
        CalibratedMethod: {
            bias_before_log: number;
            by_hull: {
                factor: number;
                /** @enum {string} */
                hull: "displacement" | "semi-displacement" | "planing";
                interval: {
                    high: number;
                    level: number;
                    low: number;
                };
                passages: number;
                pooled_weight: number;
            }[];
            cross_validated_log_error: number;
            /** @description median of measured over computed, outliers left out; the one applied */
            factor: number;
            /** @description geometric mean of the same */
            factor_ml: number;
            id: string;
            interval: {
                high: number;
                level: number;
                low: number;
            };
            passages_in_range: number;
            rank: number;
            scatter_before_log_sd: number;
            scatter_log_sd: number;
            trend: {
                depth: components["schemas"]["CalibrationTrend"];
                distance: components["schemas"]["CalibrationTrend"];
                speed: components["schemas"]["CalibrationTrend"];
            };
        };
        /** @description What measured waves say of the methods on one water. */
        Calibration: {
            cautions: {
                /** @enum {string} */
                code: "methods-not-told-apart" | "speeds-cover-little" | "trend-flagged" | "scatter-large" | "few-passages" | "many-outliers";
                /** @enum {string} */
                severity: "info" | "caution" | "warning";
                text: string;
            }[];
            coverage: {
                depth_froude_number: {
                    max: number;
                    min: number;
                };
                depth_m: {
                    max: number;
                    min: number;
                };
                distance_m: {
                    max: number;
                    min: number;
                };
                speed_mps: {
                    max: number;
                    min: number;
                };
            };
            /** Format: date-time */
            created: string;
            /** @description whether the passages tell the best method from the next */
            distinguishable: boolean;
            /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
            id: string;
            label?: string;
            methods: components["schemas"]["CalibratedMethod"][];
            name: string;
            outliers: {
                /** @description from 0 */
                index: number;
                label?: string;
                log_residual: number;
                reason: string;
            }[];
            passages: number;
            recommended_method?: string;
            reproducibility: {
                /** @description sha256 over the methods, the passages and the segment */
                input_hash: string;
                method_version: string;
                seed: number;
                segment_revision?: number;
                service_version: string;
            };
            /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
            segment_id?: string;
            /** @description in the range of a method with a factor, outliers left out */
            used: number;
        };
        /** @description A page of a list; the last page has no link `next`. */
        CalibrationList: {
            items: components["schemas"]["Calibration"][];
            links: components["schemas"]["Link"][];
        };
        /** @description A passage with what each method computes for it. */
        CalibrationPoint: {
            /** @description by method, before any factor */
            computed_height_m: {
                [key: string]: number;
            };
            depth_froude_number: number;
            depth_m: number;
            distance_m: number;
            /** @enum {string} */
            hull: "displacement" | "semi-displacement" | "planing";
            /** @description methods in whose range the passage lies */
            in_range: string[];
            /** @description of the row, from 0 */
            index: number;
            label?: string;
            max_wave_height_m: number;
            /** @description through the water */
            speed_mps: number;
        };
        /** @description Measured passages on one water. */
        CalibrationRequest: {
            /** @description the heights are in metres although the ratio looks like feet; default false */
            confirm_units?: boolean;
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description default all */
            method_ids?: ("rock-manual-2007" | "blaauw-1984" | "weggel-sorensen-1986" | "kriebel-seelig-2005" | "gates-herbich-1977" | "bhowmik-1991" | "maynord-2005")[];
            name: string;
            /** @description 5 to 10,000 measured passages */
            passages: components["schemas"]["MeasuredPassage"][];
            /** @description of the resampling; the same gives the same figures; default 1 */
            seed?: number;
            /** @description segment of the registry whose section and banks count */
            segment_id?: string;
        };
        /** @description Of the error over a figure; without slope where that hardly varies. */
        CalibrationTrend: {
            flagged: boolean;
            /** @description two-sided */
            p_value?: number;
            /** @description exponent that the method misses */
            slope?: number;
        };
        /** @description Something to know before using the figure. */
        Caution: {
            /** @enum {string} */
            code: "local-rules-apply" | "elevated" | "near-critical" | "transcritical" | "supercritical" | "no-steady-flow" | "outside-method-range" | "no-method-in-range" | "faster-window" | "bank-suction" | "bank-within-reach" | "hull-over-slope" | "depth-change" | "draught-above-permitted" | "static-clearance-small" | "meeting-not-considered" | "mooring-drawdown" | "wall-reflection" | "wall-has-no-criterion" | "permissible-velocity-exceeded" | "assumed-value-matters" | "sign-below-steerage" | "against-current" | "below-steerage" | "below-type-test-steerage" | "beyond-calibration";
            facts?: {
                [key: string]: string | number | boolean | string[];
            };
            /** @enum {string} */
            severity: "info" | "caution" | "warning";
            text: string;
        };
        /** @description The water and the traffic of the moment. */
        Conditions: {
            /** @description along the segment, positive downstream, m/s; default 0 */
            current_mps?: number;
            /**
             * @description left out with a current: the direction with the lower speed over ground
             * @enum {string}
             */
            direction?: "upstream" | "downstream";
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description a vessel that is met in this segment */
            meeting_vessel?: components["schemas"]["Vessel"];
            /** @description above the datum, m; default 0 */
            water_level_m?: number;
        };
        /** @description One bound on the speed and how it stands. */
        Criterion: {
            /** @description vessel, a bank, or receptor-<index> */
            at: string;
            /** @description stern-wave, or the wave method behind the value */
            component?: string;
            governing: boolean;
            /** @enum {string} */
            id: "critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed";
            /** @description in the unit of the criterion */
            limit: number;
            /** @description 1 - value/limit, or value/limit - 1 for at-least */
            margin_ratio?: number;
            /** @description first speed at which it is reached, taken alone */
            max_speed?: components["schemas"]["SpeedPair"];
            met: boolean;
            /** @enum {string} */
            origin: "policy" | "segment" | "request" | "vessel";
            /** @enum {string} */
            sense: "at-most" | "at-least";
            /** @enum {string} */
            unit: "m" | "m/s" | "ratio";
            /** @description at the speed of the answer; left out where it cannot be evaluated */
            value?: number;
        };
        CriticalSpeed: {
            /** @enum {string} */
            basis: "confined-channel" | "open-water";
            meeting_like_vessel?: components["schemas"]["Speed"];
            over_ground: components["schemas"]["Speed"];
            shallow_water_wave_speed: components["schemas"]["Speed"];
            supercritical_onset?: components["schemas"]["Speed"];
            through_water: components["schemas"]["Speed"];
        };
        /** @description A trapezoid by bottom width or slope, or a surveyed profile. */
        CrossSection: {
            /** @description m */
            bottom_width_m: number;
            /** @description the caller's own mark, echoed unread */
            label?: string;
        } | {
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description horizontal over vertical */
            slope_h_per_v: number;
        } | {
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description [offset_m, bed_depth_m]: offset from the sailing line, positive to the right looking downstream, strictly rising; depth positive below the datum */
            profile: [
                number,
                number
            ][];
        };
        /** @description What a passage does at a speed; figures that do not apply are left out. */
        Effects: {
            /** @description highest over the banks, J per metre of crest */
            bank_wave_energy_j_per_m?: number;
            /** @description highest over the banks, m */
            bank_wave_height_m?: number;
            banks: {
                /** @description sailing line to the waterline at the actual level, m */
                distance_m: number;
                /** @description magnitude, m */
                drawdown_m?: number;
                /** @description of the first wave after the bow passes abeam, s */
                first_arrival_s: number;
                /** @description magnitude, m/s */
                return_current_mps?: number;
                /** @enum {string} */
                side: "left" | "right" | "nearer" | "farther";
                /** @description of the highest secondary wave, J per metre of crest */
                wave_energy_j_per_m?: number;
                /** @description m */
                wave_height_m?: number;
            }[];
            /** @description immersed midship section over effective section */
            blockage_ratio?: number;
            /** @description speed over critical speed */
            critical_ratio: number;
            /** @description V/√(g h) */
            depth_froude_number: number;
            /** @description highest over the banks, m */
            drawdown_m?: number;
            /** @description m */
            front_wave_height_m?: number;
            /** @description V/√(g L) */
            length_froude_number: number;
            /** @enum {string} */
            regime: "subcritical" | "elevated" | "near-critical" | "supercritical" | "transcritical";
            /** @description highest over the banks, m/s */
            return_current_mps?: number;
            speed: components["schemas"]["SpeedPair"];
            /** @description highest of the methods in range, m */
            squat_m?: number;
            /** @description m */
            stern_wave_height_m?: number;
            /** @description after squat, m */
            under_keel_clearance_m?: number;
            wake: {
                /** @description of the cusp waves to the sailing line */
                cusp_propagation_angle_deg: number;
                /** @description of the wedge */
                half_angle_deg: number;
                /** @description of the cusp waves, m */
                length_m?: number;
                /** @description of the cusp waves, s */
                period_s?: number;
                /** @description of the transverse waves, m */
                transverse_length_m?: number;
            };
        };
        /** @description An advisory request and the speed that is asked about. */
        EffectsRequest: {
            conditions?: components["schemas"]["Conditions"];
            /** @description the caller's own mark, echoed unread */
            label?: string;
            options?: components["schemas"]["Options"];
            segment: components["schemas"]["Segment"];
            /** @description speed of the vessel, km/h; give one of the units */
            speed_kmh?: number;
            /** @description speed of the vessel, kn; give one of the units */
            speed_kn?: number;
            /** @description speed of the vessel, m/s; give one of the units */
            speed_mps?: number;
            /** @enum {string} */
            speed_reference: "through-water" | "over-ground";
            vessel: components["schemas"]["Vessel"];
        };
        /** @description A calibration with the passages it was made from. */
        FullCalibration: {
            cautions: {
                /** @enum {string} */
                code: "methods-not-told-apart" | "speeds-cover-little" | "trend-flagged" | "scatter-large" | "few-passages" | "many-outliers";
                /** @enum {string} */
                severity: "info" | "caution" | "warning";
                text: string;
            }[];
            coverage: {
                depth_froude_number: {
                    max: number;
                    min: number;
                };
                depth_m: {
                    max: number;
                    min: number;
                };
                distance_m: {
                    max: number;
                    min: number;
                };
                speed_mps: {
                    max: number;
                    min: number;
                };
            };
            /** Format: date-time */
            created: string;
            /** @description whether the passages tell the best method from the next */
            distinguishable: boolean;
            /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
            id: string;
            label?: string;
            methods: components["schemas"]["CalibratedMethod"][];
            name: string;
            outliers: {
                /** @description from 0 */
                index: number;
                label?: string;
                log_residual: number;
                reason: string;
            }[];
            passages: number;
            /** @description in the order of the rows */
            points: components["schemas"]["CalibrationPoint"][];
            recommended_method?: string;
            reproducibility: {
                /** @description sha256 over the methods, the passages and the segment */
                input_hash: string;
                method_version: string;
                seed: number;
                segment_revision?: number;
                service_version: string;
            };
            /** @description as received */
            rows: components["schemas"]["MeasuredPassage"][];
            /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
            segment_id?: string;
            /** @description in the range of a method with a factor, outliers left out */
            used: number;
        };
        /** @description Vessels that a rule applies to: every condition that is given holds. */
        Group: {
            /** @enum {string} */
            hull?: "displacement" | "semi-displacement" | "planing";
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @enum {string} */
            loading?: "laden" | "empty";
            /** @description draught below, m, exclusive */
            max_draught_m?: number;
            /** @description draught at least, m, inclusive */
            min_draught_m?: number;
            /** @description length at least, m, inclusive */
            min_length_m?: number;
            /** @description ids of vessel classes */
            vessel_classes?: string[];
        };
        /** @description What an input would have to be for a speed to be within the recommendation. */
        Inverse: {
            attainable: boolean;
            /** @enum {string} */
            governing_criterion?: "critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed";
            label?: string;
            required?: number;
            searched: [
                number,
                number
            ];
            text: string;
            /** @constant */
            unit: "m";
            /** @enum {string} */
            vary: "depth_m" | "bank_distance_m" | "draught_m";
        };
        /** @description An advisory request, a speed, and the input that may give way. */
        InverseRequest: {
            conditions?: components["schemas"]["Conditions"];
            /** @description the caller's own mark, echoed unread */
            label?: string;
            options?: components["schemas"]["Options"];
            segment: components["schemas"]["Segment"];
            /** @description speed of the vessel, km/h; give one of the units */
            speed_kmh?: number;
            /** @description speed of the vessel, kn; give one of the units */
            speed_kn?: number;
            /** @description speed of the vessel, m/s; give one of the units */
            speed_mps?: number;
            /** @enum {string} */
            speed_reference: "through-water" | "over-ground";
            /** @enum {string} */
            vary: "depth_m" | "bank_distance_m" | "draught_m";
            vessel: components["schemas"]["Vessel"];
        };
        /** @description Work that goes on after the reply. */
        Job: {
            cells_done: number;
            cells_total: number;
            /** Format: date-time */
            created: string;
            /** Format: date-time */
            finished?: string;
            id: string;
            /** @enum {string} */
            kind: "study" | "verification";
            links: {
                href: string;
                /** @enum {string} */
                rel: "self" | "results" | "limit-plan";
            }[];
            method_version: string;
            name?: string;
            /** @description why it failed */
            problem?: {
                code: string;
                detail: string;
                status: number;
                title: string;
                type: string;
            };
            /** @description of the cells */
            progress_ratio: number;
            /** @description that it was made from */
            registry_revision: number;
            /** @description at the rate so far; while running */
            remaining_s?: number;
            /** @description as received */
            request: {
                [key: string]: unknown;
            };
            service_version: string;
            /** Format: date-time */
            started?: string;
            /** @enum {string} */
            state: "queued" | "running" | "succeeded" | "failed" | "cancelled";
        };
        /** @description A page of a list; the last page has no link `next`. */
        JobList: {
            items: components["schemas"]["Job"][];
            links: components["schemas"]["Link"][];
        };
        /** @description Proposed limits, and what they follow from. */
        LimitPlan: {
            /** Format: date-time */
            created: string;
            id: string;
            name: string;
            publication?: components["schemas"]["Publication"];
            /** @description as received */
            request: {
                [key: string]: unknown;
            };
            /** @enum {string} */
            state: "draft" | "published" | "superseded";
            stretches: components["schemas"]["Stretch"][];
            study_id: string;
            totals: {
                length_below_smallest_m: number;
                /** @description of every group and direction */
                length_m: number;
                length_with_limit_m: number;
                stretches: number;
                /** @description of the stretches with a time of today */
                travel_time_comparable_s: number;
                travel_time_s: number;
                travel_time_today_s: number;
            };
            unassigned_vessels: {
                draught_m: number;
                /** @enum {string} */
                loading?: "laden" | "empty";
                vessel_class?: string;
                vessel_index: number;
            }[];
        };
        /** @description The stretches of a plan on the map. */
        LimitPlanCollection: {
            features: {
                geometry: {
                    /** @description a sailing line for each segment, from upstream */
                    coordinates: [
                        number,
                        number
                    ][][];
                    /** @constant */
                    type: "MultiLineString";
                };
                /** @description index of the stretch */
                id: number;
                properties: {
                    [key: string]: unknown;
                };
                /** @constant */
                type: "Feature";
            }[];
            links: components["schemas"]["Link"][];
            numberMatched: number;
            numberReturned: number;
            /** @constant */
            type: "FeatureCollection";
        };
        /** @description A page of a list; the last page has no link `next`. */
        LimitPlanList: {
            items: components["schemas"]["LimitPlan"][];
            links: components["schemas"]["Link"][];
        };
        /** @description Everything a plan rests on, as one document. */
        LimitPlanRecord: {
            calibrations: {
                [key: string]: unknown;
            }[];
            /** @description as the methods read them */
            inputs: {
                study: {
                    [key: string]: unknown;
                };
                units: string;
            } & {
                [key: string]: unknown;
            };
            plan: {
                /** Format: date-time */
                created: string;
                id: string;
                name: string;
                /** @description as received */
                request: {
                    [key: string]: unknown;
                };
                stretches: components["schemas"]["Stretch"][];
                study_id: string;
                totals: {
                    length_below_smallest_m: number;
                    /** @description of every group and direction */
                    length_m: number;
                    length_with_limit_m: number;
                    stretches: number;
                    /** @description of the stretches with a time of today */
                    travel_time_comparable_s: number;
                    travel_time_s: number;
                    travel_time_today_s: number;
                };
                unassigned_vessels: {
                    draught_m: number;
                    /** @enum {string} */
                    loading?: "laden" | "empty";
                    vessel_class?: string;
                    vessel_index: number;
                }[];
            };
            publication?: {
                authority: string;
                /** Format: date */
                effective_from: string;
                method_version: string;
                note?: string;
                /** @description unique among the plans */
                number: string;
                /** Format: date-time */
                published_at: string;
                /** @description name of the access key; left out without keys */
                published_by?: string;
                service_version: string;
                signatory?: string;
                /** @description id of the published plan that it takes the place of */
                supersedes?: string;
                title: string;
            };
            /** @description sha256 over the RFC 8785 form without this field */
            record_hash: string;
            record_version: number;
            results: {
                columns: string[];
                rows: (string | number | null)[][];
            };
            /** @description features as they were in the registry */
            segments: {
                [key: string]: unknown;
            }[];
            /** @description the methods with their references */
            sources: {
                [key: string]: unknown;
            }[];
            statement: string;
            study: {
                [key: string]: unknown;
            };
            vessel_classes: {
                [key: string]: unknown;
            }[];
        } & {
            [key: string]: unknown;
        };
        /** @description How limits are drawn from a study. */
        LimitPlanRequest: {
            /** @description limits by direction; default false: one for both */
            by_direction?: boolean;
            groups: components["schemas"]["PlanGroup"][];
            /** @description ids of segments whose posted limit stays */
            keep_posted?: string[];
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description in the unit of the sign */
            largest_limit?: number;
            /** @description that a stretch higher than a neighbour is long at least, m; default 0 */
            min_run_length_m?: number;
            name: string;
            passage_summary?: components["schemas"]["PassageSummaryIn"];
            /** @description one of the study, the lower the more cautious; null takes the inputs as given */
            percentile: number | null;
            /** @description step of the sign, in its unit; default 1 */
            sign_step?: number;
            /**
             * @description default km/h
             * @enum {string}
             */
            sign_unit?: "km/h" | "kn" | "mph";
            /** @description in the unit of the sign; below it no limit is proposed */
            smallest_limit?: number;
            /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
            study_id: string;
        };
        /** @description Limits in place of the segment's and the policy's. */
        Limits: {
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description of both banks, m */
            max_bank_wave_height_m?: number;
            /** @description speed over critical speed */
            max_critical_ratio?: number;
            /** @description depth Froude number */
            max_depth_froude_number?: number;
            /** @description at both banks, m */
            max_drawdown_m?: number;
            /** @description of all receptors, m */
            max_receptor_wave_height_m?: number;
            /** @description at both banks, m/s */
            max_return_current_mps?: number;
            /** @description net clearance over draught */
            min_under_keel_clearance_ratio?: number;
            /**
             * @description rule for long wake wash; default when-long: from 4.5 s on
             * @enum {string}
             */
            wake_wash?: "when-long" | "always" | "never";
        };
        /** @description Where this page or the next one is. */
        Link: {
            /** @description path and query, from the root of the service */
            href: string;
            /** @enum {string} */
            rel: "self" | "next";
        };
        /** @description The process answers. */
        Live: {
            /** @constant */
            status: "live";
        };
        /** @description Every segment with every vessel in all conditions. */
        MatrixRequest: {
            /** @description default [{}] */
            conditions?: components["schemas"]["Conditions"][];
            /** @description the caller's own mark, echoed unread */
            label?: string;
            options?: components["schemas"]["Options"];
            /** @description "all", those of a waterway, or ids and descriptions */
            segments: "all" | {
                /** @description the caller's own mark, echoed unread */
                label?: string;
                waterway: string;
            } | (string | components["schemas"]["Segment"])[];
            vessels: components["schemas"]["Vessel"][];
        };
        /** @description A passage whose highest wave was measured: a vessel by class or by description. */
        MeasuredPassage: {
            /** @description m */
            beam_m?: number;
            /** @description displaced volume over length, beam and draught */
            block_coefficient?: number;
            /** @description along the waterway, positive downstream, m/s; default 0 */
            current_mps?: number;
            /** @description of the water at the sailing line during the passage, m */
            depth_m: number;
            /**
             * @description of the vessel; required with a current and a speed over ground
             * @enum {string}
             */
            direction?: "upstream" | "downstream";
            /** @description displaced volume at rest, m3 */
            displacement_m3?: number;
            /** @description gauge to sailing line, m */
            distance_m: number;
            /** @description m */
            draught_m?: number;
            /** @description at the gauge, m; kept and not used */
            drawdown_m?: number;
            /** @description stem to the start of the parallel middle body, m */
            entrance_length_m?: number;
            /** @enum {string} */
            hull?: "displacement" | "semi-displacement" | "planing";
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description waterline length, m */
            length_m?: number;
            /**
             * @description of a class; default laden
             * @enum {string}
             */
            loading?: "laden" | "empty";
            /** @description highest wave of the passage at the gauge, crest to trough, m */
            max_wave_height_m: number;
            /** @description immersed midship section over beam and draught */
            midship_coefficient?: number;
            /** @description of that wave, s; kept and not used */
            period_s?: number;
            /** @description speed of the vessel, km/h; give one of the units */
            speed_kmh?: number;
            /** @description speed of the vessel, kn; give one of the units */
            speed_kn?: number;
            /** @description speed of the vessel, m/s; give one of the units */
            speed_mps?: number;
            /** @enum {string} */
            speed_reference: "through-water" | "over-ground";
            /**
             * Format: date-time
             * @description of the passage, RFC 3339; kept as it comes
             */
            time?: string;
            /** @description id of a vessel class; its figures count where none is given here */
            vessel_class?: string;
            /** @description of the water surface during the passage, m; default the segment's */
            width_m?: number;
        };
        /** @description A published method: what it says, where it holds, where to read it. */
        Method: {
            /** @description both where left out */
            channels?: ("open" | "confined")[];
            /** @enum {string} */
            distance_from?: "hull-side" | "sailing-line";
            /** @description true where the source was recalled and not read again */
            from_memory: boolean;
            hulls: ("displacement" | "semi-displacement" | "planing")[];
            id: string;
            inland_only: boolean;
            /** @enum {string} */
            kind: "wave-height" | "squat" | "primary-wave" | "critical-speed" | "wake-geometry" | "bank-stability";
            /** @description in words and symbols */
            law: string;
            name: string;
            /** @enum {string} */
            nature: "envelope" | "central";
            quantities: {
                name: string;
                symbol: string;
                unit: string;
            }[];
            range: {
                /** @description hulls that it binds; all where left out */
                hulls?: ("displacement" | "semi-displacement" | "planing")[];
                max?: number;
                min?: number;
                quantity: string;
            }[];
            reference: string;
            version: string;
        };
        /** @description A page of a list; the last page has no link `next`. */
        MethodList: {
            items: components["schemas"]["Method"][];
            links: components["schemas"]["Link"][];
        };
        /** @description A proposal in code words of the Notices to Skippers standard. It is no official message: an authority makes that. */
        Notice: {
            /** @constant */
            legal_status: "proposal";
            limit_plan_id: string;
            limitations: {
                chainage_from_m: number;
                chainage_to_m: number;
                /** @enum {string} */
                direction_code: "ALL" | "UPS" | "DWN";
                /**
                 * Format: date
                 * @description of a published plan
                 */
                effective_from?: string;
                /** @description of the limit as it is on the sign */
                exact_value_kmh?: number;
                /** @constant */
                indication_code?: "MAX";
                /**
                 * @description speed limit, or no wash of waves
                 * @enum {string}
                 */
                limitation_code: "SPEED" | "WAVWAS";
                /** @constant */
                speed_reference: "over-ground";
                /**
                 * @description the nearest; ALL where none fits
                 * @enum {string}
                 */
                target_group_code: "ALL" | "COM" | "PAX" | "PLE" | "CNV";
                /** @description of the group in the plan, which the code may widen */
                target_group_name: string;
                /** @constant */
                unit?: "km/h";
                value?: number;
                waterway?: string;
            }[];
            number?: string;
            text: string;
        };
        /** @description How the advisory is made. */
        Options: {
            /** @description default true */
            apply_posted_limit?: boolean;
            /** @description null ignores the segment's */
            calibration_id?: string | null;
            /**
             * @description of the methods in range; default highest
             * @enum {string}
             */
            combine?: "highest" | "median";
            /** @description add the speed curve; default false */
            curve?: boolean;
            /** @description the caller's own mark, echoed unread */
            label?: string;
            limits?: components["schemas"]["Limits"];
            /** @description step of the sign, in its unit; default 1 */
            sign_step?: number;
            /**
             * @description default km/h
             * @enum {string}
             */
            sign_unit?: "km/h" | "kn" | "mph";
            /** @description measured over computed wave height, for every method */
            wave_factor?: number;
            /** @description methods that count where one of them is in range; default applicable */
            wave_methods?: "applicable" | ("rock-manual-2007" | "blaauw-1984" | "weggel-sorensen-1986" | "kriebel-seelig-2005" | "gates-herbich-1977" | "bhowmik-1991" | "maynord-2005")[];
        };
        /** @description A field of a log of position reports and how it is recognised. */
        PassageColumn: {
            /** @enum {string} */
            field: "time" | "mmsi" | "eni" | "vessel_name" | "lat" | "lon" | "sog_kn" | "cog_deg" | "heading_deg" | "nav_status" | "ship_type" | "length_m" | "beam_m" | "draught_m" | "type_of_mobile" | "vessel_class" | "loading" | "convoy_length_m" | "convoy_beam_m" | "convoy_draught_m" | "water_level_m" | "current_mps";
            /** @description what is read as not known */
            missing: string;
            /** @description accepted in either letter case, in a CSV header or as NDJSON keys */
            names: string[];
            /** @description fields of which a log must have at least one */
            one_of?: ("time" | "mmsi" | "eni" | "vessel_name" | "lat" | "lon" | "sog_kn" | "cog_deg" | "heading_deg" | "nav_status" | "ship_type" | "length_m" | "beam_m" | "draught_m" | "type_of_mobile" | "vessel_class" | "loading" | "convoy_length_m" | "convoy_beam_m" | "convoy_draught_m" | "water_level_m" | "current_mps")[];
            required: boolean;
            /** @description null for texts and codes */
            unit: string | null;
        };
        /** @description Fields of a log of position reports. */
        PassageColumns: {
            items: components["schemas"]["PassageColumn"][];
        };
        /** @description Consecutive reports of a vessel above the maximum. */
        PassageEvent: {
            /** @enum {string} */
            certainty: "certain" | "depends-on-draught";
            /** @description probability that the peak excess is above zero, 0 to 1 */
            confidence: number | null;
            direction: ("upstream" | "downstream") | null;
            /** @description along the sailing line, m */
            distance_m: number;
            /** @description s */
            duration_s: number;
            /** @description RFC 3339 UTC */
            end: string | null;
            eni: string | null;
            /** @description the same for the same event in another run */
            event_id: string;
            /** @description physical line of the log, from 1 */
            first_line: number;
            /** @enum {string} */
            governing_criterion: "critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed";
            /** @description physical line of the log, from 1 */
            last_line: number;
            loading: ("laden" | "empty") | null;
            /** @description mean of the reports, kn */
            mean_excess_kn: number | null;
            mmsi: string | null;
            /** @description higher one of both banks, m */
            peak_bank_wave_height_m: number | null;
            /** @description at the peak */
            peak_critical_ratio: number | null;
            /** @description kn */
            peak_excess_kn: number | null;
            /** @description degrees */
            peak_lat: number;
            /** @description degrees */
            peak_lon: number;
            /** @description recommended maximum at the peak, kn */
            peak_max_over_ground_kn: number | null;
            /** @description kn */
            peak_over_ground_kn: number;
            /** @description RFC 3339 UTC */
            peak_time: string | null;
            /** @description highest excess over the posted limit, kn */
            posted_peak_excess_kn: number | null;
            /** @description consecutive reports above the maximum */
            reports: number;
            segment_id: string;
            /** @description RFC 3339 UTC */
            start: string | null;
            /** @constant */
            type: "event";
            vessel_class: string;
            vessel_name: string | null;
        };
        /** @description A position report and what became of it. */
        PassageReport: {
            /** @description to the waterline at the water level, m */
            bank_distance_left_m: number | null;
            /** @description likewise, m */
            bank_distance_right_m: number | null;
            /** @description likewise, m */
            beam_m: number | null;
            /** @description codes, joined by ;: those of an advisory, and convoy-size-unknown (A towboat reports its own hull, not its convoy: that of the convoy may be lower.), bank-sides-unknown (Which bank is the nearer one is not known: the vessel is taken to be off the sailing line towards it.), position-at-bank (As reported, the hull reaches over a waterline: it is judged as close to it as it floats.), judged-on-sailing-line (The hull cannot float at the position reported: it is judged on the sailing line.), laden-does-not-fit (Laden as its class, the vessel does not fit this water: it is judged empty.) */
            cautions: string | null;
            /** @description m along the waterway */
            chainage_m: number | null;
            /** @description speed through the water over the critical speed */
            critical_ratio: number | null;
            /** @description positive downstream, m/s */
            current_mps: number | null;
            /** @description as sailed */
            depth_froude_number: number | null;
            direction: ("upstream" | "downstream") | null;
            /** @description likewise, m */
            draught_m: number | null;
            eni: string | null;
            /** @description over ground above the maximum, kn; negative below it */
            excess_kn: number | null;
            governing_criterion: ("critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed") | null;
            /** @description that was computed with, m */
            length_m: number | null;
            /** @description physical line of the log, from 1 */
            line: number;
            loading: ("laden" | "empty") | null;
            /** @description recommended maximum that the verdict uses, kn */
            max_over_ground_kn: number | null;
            mmsi: string | null;
            /** @description from the sailing line, positive to the right looking downstream, m */
            offset_m: number | null;
            outcome: ("limited" | "service-speed" | "no-safe-speed") | null;
            /** @description kn */
            over_ground_kn: number | null;
            /** @description kn */
            posted_excess_kn: number | null;
            /** @description over ground, kn */
            posted_limit_kn: number | null;
            /** @description why it is not judged */
            reason: string | null;
            /** @description the same on the sailing line beside the position, kn */
            sailing_line_max_over_ground_kn: number | null;
            segment_id: string | null;
            /** @enum {string} */
            status: "matched" | "stationary" | "outside-fairway" | "ambiguous" | "no-segment" | "invalid-position" | "implausible-jump" | "duplicate" | "late" | "not-a-vessel" | "rejected";
            /** @description kn */
            through_water_kn: number | null;
            /** @description RFC 3339 UTC */
            time: string | null;
            /** @constant */
            type: "report";
            verdict: ("within" | "exceeds" | "depends-on-draught" | "no-safe-speed") | null;
            vessel_basis: ("reported" | "assumed-draught" | "assumed-dimensions" | "tow-override" | "class-column" | "tow-hull-only") | null;
            vessel_class: string | null;
            vessel_name: string | null;
            /** @description above the datum, m */
            water_level_m: number | null;
            /** @description per metre of crest at the left bank, J/m */
            wave_energy_left_j_per_m: number | null;
            /** @description likewise at the right bank, J/m */
            wave_energy_right_j_per_m: number | null;
            /** @description at the left bank, m */
            wave_height_left_m: number | null;
            /** @description at the right bank, m */
            wave_height_right_m: number | null;
        };
        /** @description Totals of a log; without this line an answer is incomplete. */
        PassageSummary: {
            /** @constant */
            complete: true;
            events: {
                /** @description events */
                certain: number;
                /** @description events */
                depends_on_draught: number;
            };
            /** @description RFC 3339 UTC */
            from: string | null;
            groups: {
                /** @description of those for which a limit is posted, passages with a report above it */
                above_posted_ratio: number | null;
                /** @description of the judged passages, those with a report that certainly exceeds the maximum */
                above_recommended_ratio: number | null;
                direction: ("upstream" | "downstream") | null;
                /** @description passages by speed, bins from zero */
                histogram_kn: {
                    counts: number[];
                    step: number;
                };
                /** @description passages with a report where no speed is safe */
                no_safe_speed_passages: number;
                /** @description of this class through this segment in this direction */
                passages: number;
                segment_id: string;
                /** @description median of the speeds of the passages over ground, kn */
                speed_p50_kn: number;
                /** @description kn */
                speed_p85_kn: number;
                /** @description kn */
                speed_p95_kn: number;
                /** @description passages with a report whose waves no method covers, left out of the energies */
                unknown_energy_passages: number;
                vessel_class: string;
                /** @description sum of the highest reports of the passages, per metre of crest, J/m */
                wave_energy_left_j_per_m: number | null;
                /** @description likewise, J/m */
                wave_energy_right_j_per_m: number | null;
                /** @description share of the energy that the worst tenth of the passages brings */
                worst_tenth_energy_ratio: number | null;
            }[];
            parameters: {
                [key: string]: string | number | null;
            };
            /** @description through all segments */
            passages: number;
            reports: {
                by_status: {
                    [key: string]: number;
                };
                ignored_columns: string[];
                /** @description rows with data */
                read: number;
                /** @description the first 1000 */
                rejected: {
                    /** @description physical line of the log, from 1 */
                    line: number;
                    reason: string;
                }[];
            };
            reproducibility: {
                method_version: string;
                registry_revision: number;
                service_version: string;
            };
            /** @description RFC 3339 UTC */
            to: string | null;
            /** @constant */
            type: "summary";
            /** @description vessels with a matched report */
            vessels: number;
        };
        /** @description The summary line of a check of passages, as it was received. */
        PassageSummaryIn: {
            /** @constant */
            complete: true;
            groups: ({
                direction: ("upstream" | "downstream") | null;
                histogram_kn: {
                    counts: number[];
                    /** @description width of a bin, kn */
                    step: number;
                } & {
                    [key: string]: unknown;
                };
                passages: number;
                segment_id: string;
                vessel_class: string | null;
            } & {
                [key: string]: unknown;
            })[];
            /** @constant */
            type: "summary";
        } & {
            [key: string]: unknown;
        };
        /** @description Vessels for which one limit is posted. */
        PlanGroup: {
            applies_to: components["schemas"]["Group"];
            /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
            id: string;
            /** @description the caller's own mark, echoed unread */
            label?: string;
            name: string;
        };
        /** @description A limit that is in force; the lowest that applies counts. */
        PostedLimit: {
            applies_to?: components["schemas"]["Group"];
            /**
             * @description default both
             * @enum {string}
             */
            direction?: "both" | "upstream" | "downstream";
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /**
             * @description default over-ground
             * @enum {string}
             */
            reference?: "over-ground" | "through-water";
            /** @description posted limit, km/h; give one of the units */
            speed_kmh?: number;
            /** @description posted limit, kn; give one of the units */
            speed_kn?: number;
            /** @description posted limit, m/s; give one of the units */
            speed_mps?: number;
        };
        /** @description Why a request was refused (RFC 9457). */
        Problem: {
            /**
             * @description last part of type
             * @enum {string}
             */
            code: "invalid-request" | "malformed-json" | "malformed-csv" | "key-required" | "role-too-small" | "route-not-found" | "segment-not-found" | "vessel-class-not-found" | "revision-not-found" | "study-not-found" | "limit-plan-not-found" | "calibration-not-found" | "method-not-found" | "problem-not-found" | "method-not-allowed" | "not-acceptable" | "request-timeout" | "built-in-class" | "in-use" | "study-not-finished" | "limit-plan-published" | "number-taken" | "stale-revision" | "payload-too-large" | "too-many-cells" | "line-too-long" | "unsupported-media-type" | "impossible-input" | "too-few-passages" | "units-doubtful" | "revision-required" | "too-many-requests" | "internal" | "overloaded" | "store-unavailable" | "storage-full" | "stopping";
            /** @description what to change in this request */
            detail: string;
            errors?: {
                /** @description possible values or fields, nearest first */
                allowed?: string[];
                /** @enum {string} */
                code: "required" | "unknown-field" | "wrong-type" | "out-of-range" | "not-in-list" | "one-of" | "pattern" | "clash";
                detail: string;
                /** @description figures of this occurrence; names carry the unit */
                facts?: {
                    [key: string]: number | string | boolean | string[];
                };
                /** @description id of the feature of an import */
                feature_id?: string;
                /** @description physical line, from 1 */
                line?: number;
                /** @description query parameter, path parameter or CSV column */
                parameter?: string;
                /** @description JSON Pointer fragment into the body */
                pointer?: string;
            }[];
            /**
             * @description present when there were more than 1000 errors
             * @constant
             */
            errors_truncated?: true;
            /** @description figures of this occurrence; names carry the unit */
            facts?: {
                [key: string]: number | string | boolean | string[];
            };
            /** @description urn:request: and the request id, as in the header x-request-id */
            instance: string;
            /** @description repeats the HTTP status */
            status: number;
            /** @description the same for every occurrence */
            title: string;
            /** @description path that describes this kind of problem */
            type: string;
        };
        /** @description A line that cannot be answered. */
        ProblemLine: {
            /** @description physical line of the body, from 1 */
            line: number;
            problem: components["schemas"]["Problem"];
        };
        /** @description A kind of problem and what to do about it. */
        ProblemType: {
            /** @description what a caller does about it */
            description: string;
            /** @enum {string} */
            slug: "invalid-request" | "malformed-json" | "malformed-csv" | "key-required" | "role-too-small" | "route-not-found" | "segment-not-found" | "vessel-class-not-found" | "revision-not-found" | "study-not-found" | "limit-plan-not-found" | "calibration-not-found" | "method-not-found" | "problem-not-found" | "method-not-allowed" | "not-acceptable" | "request-timeout" | "built-in-class" | "in-use" | "study-not-finished" | "limit-plan-published" | "number-taken" | "stale-revision" | "payload-too-large" | "too-many-cells" | "line-too-long" | "unsupported-media-type" | "impossible-input" | "too-few-passages" | "units-doubtful" | "revision-required" | "too-many-requests" | "internal" | "overloaded" | "store-unavailable" | "storage-full" | "stopping";
            /** @description HTTP status it comes with */
            status: number;
            title: string;
        };
        /** @description A page of a list; the last page has no link `next`. */
        ProblemTypeList: {
            items: components["schemas"]["ProblemType"][];
            links: components["schemas"]["Link"][];
        };
        Publication: {
            authority: string;
            /** Format: date */
            effective_from: string;
            method_version: string;
            note?: string;
            /** @description unique among the plans */
            number: string;
            /** Format: date-time */
            published_at: string;
            /** @description name of the access key; left out without keys */
            published_by?: string;
            /** @description sha256 over the canonical form of the record */
            record_hash: string;
            service_version: string;
            signatory?: string;
            /** @description id of the published plan that it takes the place of */
            supersedes?: string;
            title: string;
        };
        /** @description Under which number, title and name a plan is published. */
        PublishRequest: {
            authority: string;
            /** Format: date */
            effective_from: string;
            /** @description the caller's own mark, echoed unread */
            label?: string;
            note?: string;
            /** @description unique among the plans */
            number: string;
            signatory?: string;
            /** @description id of the published plan that it takes the place of */
            supersedes?: string;
            title: string;
        };
        /** @description The service can answer, and from which versions. */
        Ready: {
            /** @description kind of store behind the registry */
            database: string;
            method_version: string;
            /** @description rises by one with each write */
            registry_revision: number;
            service_version: string;
            /** @constant */
            status: "ready";
        };
        /** @description Something at the water that waves must not harm. */
        Receptor: {
            /** @description of a registry segment: it counts at this place alone, where a station is put for it; left out, or where one section describes the whole segment, it counts all along, m */
            chainage_m?: number;
            /** @description from the sailing line, m */
            distance_m: number;
            /** @enum {string} */
            kind: "moored-small-craft" | "bathing-place" | "reed-bed" | "other";
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description m; required except for moored small craft */
            max_wave_height_m?: number;
            name?: string;
            /**
             * @description looking downstream, or as the banks are given
             * @enum {string}
             */
            side: "left" | "right" | "nearer" | "farther";
        };
        /** @description One bank of a registry segment, by its line or by a distance. */
        RegistryBank: {
            /** @description sailing line to the waterline at the datum, m */
            distance_m?: number;
            /**
             * @description default unprotected
             * @enum {string}
             */
            kind?: "unprotected" | "reed" | "riprap" | "wall";
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description waterline as a LineString, [lon, lat], in either order of vertices */
            line?: {
                coordinates: (number[] | unknown)[];
                type: string;
            };
            /** @description m */
            max_drawdown_m?: number;
            /** @description m/s */
            max_return_current_mps?: number;
            /** @description in place of the default for the kind, m */
            max_wave_height_m?: number;
            /** @description horizontal over vertical */
            slope_h_per_v?: number;
            /** @description median stone size of riprap, m */
            stone_d50_m?: number;
            /** @description (rho_s - rho)/rho of the stone, default 1.65 */
            stone_relative_density?: number;
            /** @description depth below the datum at the toe, m; limits waves by breaking */
            toe_depth_m?: number;
        };
        Reproducibility: {
            calibration_id?: string;
            /** @description sha256 over the canonical form of everything the answer follows from */
            input_hash: string;
            method_version: string;
            registry_revision?: number;
            segment_revision?: number;
            service_version: string;
            vessel_class_revision?: number;
        };
        /** @description The water: a registry segment by id, with fields that replace stored ones for this call, or a description. */
        Segment: {
            /** @description the caller's own values, never read */
            attributes?: {
                [key: string]: string | number | boolean;
            };
            /** @description to the nearer bank; the farther one is the width less this */
            bank_distance_m?: number;
            /**
             * @description of both banks, default unprotected
             * @enum {string}
             */
            bank_kind?: "unprotected" | "reed" | "riprap" | "wall";
            /** @description in place of bank_distance_m; left and right looking downstream */
            banks?: {
                /** @description the caller's own mark, echoed unread */
                label?: string;
                left: components["schemas"]["Bank"];
                right: components["schemas"]["Bank"];
            };
            /**
             * @description for the permissible velocity
             * @enum {string}
             */
            bed_kind?: "fine-sand" | "medium-sand" | "coarse-sand" | "very-coarse-sand" | "very-fine-gravel" | "fine-gravel" | "medium-gravel" | "coarse-gravel" | "very-coarse-gravel" | "small-cobbles" | "sandy-loam" | "loess";
            /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
            calibration_id?: string;
            /** @description at the upstream end, m */
            chainage_from_m?: number;
            /** @description at the downstream end, m */
            chainage_to_m?: number;
            /**
             * @description default confined
             * @enum {string}
             */
            confinement?: "confined" | "open";
            cross_section?: components["schemas"]["CrossSection"];
            datum?: string;
            /** @description bed below the datum at the sailing line, m */
            depth_m?: number;
            /** @description gauge that gives the level; a filter of lists */
            gauge_id?: string;
            /** @description take this registry segment */
            id?: string;
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description permitted draught, m */
            max_draught_m?: number;
            /** @description beside the policy; the stricter counts, m */
            min_under_keel_clearance_m?: number;
            name?: string;
            posted_limits?: components["schemas"]["PostedLimit"][];
            receptors?: components["schemas"]["Receptor"][];
            source?: string;
            survey_date?: string;
            /** @description name of the waterway; a filter of lists */
            waterway?: string;
            /** @description water surface at the datum, m */
            width_m?: number;
        };
        SegmentCollection: {
            features: components["schemas"]["SegmentFeature"][];
            links: components["schemas"]["Link"][];
            numberMatched: number;
            numberReturned: number;
            /** @constant */
            type: "FeatureCollection";
        };
        /** @description A GeoJSON collection of segments with unique ids. A crs member is refused unless it names CRS84. */
        SegmentCollectionInput: {
            features: components["schemas"]["SegmentFeatureInput"][];
            /** @constant */
            type: "FeatureCollection";
        } & {
            [key: string]: unknown;
        };
        /** @description A segment: its sailing line, drawn downstream, and the segment object. */
        SegmentFeature: {
            bbox: number[];
            geometry: {
                coordinates: [
                    number,
                    number
                ][];
                /** @constant */
                type: "LineString";
            };
            id: string;
            properties: {
                /** @description the caller's own values, never read */
                attributes?: {
                    [key: string]: string | number | boolean;
                };
                /** @description to the nearer bank; the farther one is the width less this */
                bank_distance_m?: number;
                /**
                 * @description of both banks, default unprotected
                 * @enum {string}
                 */
                bank_kind?: "unprotected" | "reed" | "riprap" | "wall";
                /** @description in place of bank_distance_m; left and right looking downstream, each by its line or its distance */
                banks?: {
                    /** @description the caller's own mark, echoed unread */
                    label?: string;
                    left: components["schemas"]["RegistryBank"];
                    right: components["schemas"]["RegistryBank"];
                };
                /**
                 * @description for the permissible velocity
                 * @enum {string}
                 */
                bed_kind?: "fine-sand" | "medium-sand" | "coarse-sand" | "very-coarse-sand" | "very-fine-gravel" | "fine-gravel" | "medium-gravel" | "coarse-gravel" | "very-coarse-gravel" | "small-cobbles" | "sandy-loam" | "loess";
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                calibration_id?: string;
                /** @description at the upstream end, m */
                chainage_from_m?: number;
                /** @description at the downstream end, m */
                chainage_to_m?: number;
                /**
                 * @description default confined
                 * @enum {string}
                 */
                confinement?: "confined" | "open";
                cross_section?: components["schemas"]["CrossSection"];
                datum?: string;
                /** @description bed below the datum at the sailing line, m */
                depth_m?: number;
                /** @description gauge that gives the level; a filter of lists */
                gauge_id?: string;
                length_m: number;
                /** @description permitted draught, m */
                max_draught_m?: number;
                /** @description beside the policy; the stricter counts, m */
                min_under_keel_clearance_m?: number;
                name?: string;
                posted_limits?: components["schemas"]["PostedLimit"][];
                receptors?: components["schemas"]["Receptor"][];
                revision: number;
                source?: string;
                /** @description in any order. Where figures differ by more than 2 % between neighbours, others are put between */
                stations?: components["schemas"]["Station"][];
                survey_date?: string;
                updated: string;
                /** @description name of the waterway; a filter of lists */
                waterway?: string;
                /** @description water surface at the datum, m */
                width_m?: number;
            } & {
                [key: string]: unknown;
            };
            /** @constant */
            type: "Feature";
        };
        /** @description A GeoJSON feature: a sailing line of [longitude, latitude], drawn downstream, and a segment object. A crs member is refused unless it names CRS84. */
        SegmentFeatureInput: {
            geometry: {
                type: string;
            } & {
                [key: string]: unknown;
            };
            id?: string | number;
            properties: {
                [key: string]: unknown;
            };
            /** @constant */
            type: "Feature";
        } & {
            [key: string]: unknown;
        };
        /** @description What an import made, or would make. */
        SegmentImport: {
            created: number;
            dry_run: boolean;
            /** @description of a dry run; otherwise they are a problem */
            faults: {
                allowed?: string[];
                code: string;
                detail: string;
                facts?: {
                    [key: string]: unknown;
                };
                feature_id?: string;
                pointer: string;
            }[];
            /**
             * @description present when there are more than 1000 faults
             * @constant
             */
            faults_truncated?: true;
            features: number;
            registry_revision: number;
            /** @description what is doubtful and was accepted */
            remarks: {
                allowed?: string[];
                code: string;
                detail: string;
                facts?: {
                    [key: string]: unknown;
                };
                feature_id?: string;
                pointer: string;
            }[];
            /**
             * @description present when there are more than 1000 remarks
             * @constant
             */
            remarks_truncated?: true;
            unchanged: number;
            updated: number;
        };
        /** @description One change of a segment. */
        SegmentRevision: {
            /** @enum {string} */
            action: "created" | "updated" | "deleted" | "imported";
            changed: string[];
            href: string;
            /** @description name of the access key it was made with */
            key?: string;
            revision: number;
            time: string;
        };
        /** @description A page of a list; the last page has no link `next`. */
        SegmentRevisionList: {
            items: components["schemas"]["SegmentRevision"][];
            links: components["schemas"]["Link"][];
        };
        /** @description Effects over speed on a registry segment. */
        SegmentSpeedCurve: {
            cautions: components["schemas"]["Caution"][];
            conditions: {
                /** @description positive downstream, m/s */
                current_mps: number;
                /** @enum {string} */
                direction?: "upstream" | "downstream";
                /** @description above the datum, m */
                water_level_m: number;
            };
            criteria: components["schemas"]["Criterion"][];
            critical_speed: components["schemas"]["CriticalSpeed"];
            points: {
                bank_wave_height_m: number | null;
                critical_ratio: number;
                depth_froude_number: number;
                drawdown_m: number | null;
                over_ground_kmh: number;
                over_ground_kn: number;
                over_ground_mps: number;
                /** @enum {string} */
                regime: "subcritical" | "elevated" | "near-critical" | "supercritical" | "transcritical";
                return_current_mps: number | null;
                squat_m: number | null;
                stern_wave_height_m: number | null;
                through_water_mps: number;
                under_keel_clearance_m: number | null;
                wave_height_by_method_m: {
                    [key: string]: number | null;
                };
            }[];
            recommended_max_speed?: components["schemas"]["SpeedPair"];
            reproducibility: components["schemas"]["Reproducibility"];
            segment?: {
                id: string;
                name?: string;
                revision: number;
            };
            /** @description that governs along a registry segment. The index counts the stations that are computed with, in the order of the sailing line: those given and of the bank lines as far as they are needed, one at each receptor with a chainage, and those put between */
            station?: {
                chainage_m?: number;
                index: number;
            };
            vessel: components["schemas"]["VesselUsed"];
        };
        /** @description Which uncertain input moves the answer most, largest swing first. */
        Sensitivity: {
            /** @description left out when no speed is safe */
            base?: components["schemas"]["SpeedPair"];
            inputs: {
                at_high?: components["schemas"]["SpeedPair"];
                at_low?: components["schemas"]["SpeedPair"];
                field: string;
                high: number;
                low: number;
                /** @description difference of the recommended speeds over ground; none counts as 0 */
                swing_mps: number;
            }[];
            label?: string;
        };
        /** @description An advisory request and how uncertain its inputs are. */
        SensitivityRequest: {
            conditions?: components["schemas"]["Conditions"];
            /** @description the caller's own mark, echoed unread */
            label?: string;
            options?: components["schemas"]["Options"];
            segment: components["schemas"]["Segment"];
            uncertainty: components["schemas"]["Uncertainty"];
            vessel: components["schemas"]["Vessel"];
        };
        /** @description One speed in three units. */
        Speed: {
            /** @description km/h */
            kmh: number;
            /** @description kn */
            kn: number;
            /** @description m/s */
            mps: number;
        };
        SpeedCurve: {
            criteria: components["schemas"]["Criterion"][];
            critical_speed: components["schemas"]["CriticalSpeed"];
            points: {
                bank_wave_height_m: number | null;
                critical_ratio: number;
                depth_froude_number: number;
                drawdown_m: number | null;
                over_ground_kmh: number;
                over_ground_kn: number;
                over_ground_mps: number;
                /** @enum {string} */
                regime: "subcritical" | "elevated" | "near-critical" | "supercritical" | "transcritical";
                return_current_mps: number | null;
                squat_m: number | null;
                stern_wave_height_m: number | null;
                through_water_mps: number;
                under_keel_clearance_m: number | null;
                wave_height_by_method_m: {
                    [key: string]: number | null;
                };
            }[];
            recommended_max_speed?: components["schemas"]["SpeedPair"];
        };
        /** @description A speed through the water and what it is over the ground. */
        SpeedPair: {
            over_ground: components["schemas"]["Speed"];
            through_water: components["schemas"]["Speed"];
        };
        SquatMethodValue: {
            applicable: boolean;
            id: string;
            outside: {
                max?: number;
                min?: number;
                quantity: string;
                value: number | string;
            }[];
            reference: string;
            /** @description m; a value out of range does not govern */
            squat_m?: number;
        };
        /** @description Depth and width at a place along a segment; both are interpolated by chainage between stations. */
        Station: {
            /** @description sailing line to the waterline at the datum, m */
            bank_distance_m?: number;
            /** @description m */
            chainage_m: number;
            cross_section?: components["schemas"]["CrossSection"];
            /** @description bed below the datum at the sailing line, m */
            depth_m: number;
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description sailing line to the waterline at the datum, m */
            left_distance_m?: number;
            /** @description sailing line to the waterline at the datum, m */
            right_distance_m?: number;
            /** @description water surface at the datum, m */
            width_m: number;
        };
        /** @description One limit over consecutive segments. */
        Stretch: {
            cautions: {
                code: string;
                facts?: {
                    [key: string]: string | number | string[];
                };
                /** @enum {string} */
                severity: "info" | "caution" | "warning";
                text: string;
            }[];
            /** @description that no proposed limit exceeds: rounded down to the step */
            ceiling?: components["schemas"]["Speed"];
            /** @description at the upstream end */
            chainage_from_m: number;
            chainage_to_m: number;
            /** @enum {string} */
            direction: "both" | "upstream" | "downstream";
            /** @description share of the passages that were faster than the limit */
            exceeding_ratio?: number;
            /** @description the cell that allows least */
            governing?: {
                /** @enum {string} */
                criterion?: "critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed";
                current_mps: number;
                /** @enum {string} */
                direction?: "upstream" | "downstream";
                /** @enum {string} */
                loading?: "laden" | "empty";
                segment_id: string;
                /** @description m */
                station_chainage_m?: number;
                vessel_class?: string;
                vessel_index: number;
                water_level_m: number;
            };
            group_id: string;
            index: number;
            /** @description along the sailing line */
            length_m: number;
            limit?: {
                /** @enum {string} */
                unit: "km/h" | "kn" | "mph";
                value: number;
            };
            /** @description over ground */
            limit_speed?: components["schemas"]["Speed"];
            /** @description the ceiling before it was rounded and cut */
            lowest_maximum?: components["schemas"]["Speed"];
            /** @description lowest maximum less limit; negative where a kept limit is above */
            margin_mps?: number;
            /** @enum {string} */
            outcome: "limit" | "kept" | "below-smallest-limit";
            passages?: number;
            /** @description from upstream */
            segment_ids: string[];
            /** @description lowest posted limit that applies today, over ground */
            today?: components["schemas"]["Speed"];
            /** @description at the limit */
            travel_time_s?: number;
            /** @description at the posted limits of today, where every segment has one */
            travel_time_today_s?: number;
            waterway?: string;
        };
        /** @description Segments by vessels by levels by currents and directions. */
        StudyRequest: {
            /** @description default [0] */
            currents_mps?: number[];
            /** @description default both; without any current there is one row for both */
            directions?: ("upstream" | "downstream")[];
            /** @description the caller's own mark, echoed unread */
            label?: string;
            name: string;
            /** @description of every cell; apply_posted_limit is false by default here */
            options?: components["schemas"]["Options"];
            /** @description "all", those of a waterway, or ids; of the registry */
            segments: "all" | {
                /** @description the caller's own mark, echoed unread */
                label?: string;
                waterway: string;
            } | string[];
            uncertainty?: components["schemas"]["StudyUncertainty"];
            vessels: components["schemas"]["Vessel"][];
            /** @description default [0] */
            water_levels_m?: number[];
        };
        /** @description A cell of a study. For each percentile p there are `max_over_ground_p<p>_mps`, `_kn` and `_kmh`, the speed that p per cent of the samples do not reach; for each criterion `governed_by_<id>_ratio`, the share of the samples that it governs. */
        StudyRow: {
            chainage_from_m: number;
            chainage_to_m: number;
            /** @description through the water, m/s */
            critical_speed_mps: number | null;
            /** @description positive downstream */
            current_mps: number;
            /** @description null where one answer holds for both */
            direction: ("upstream" | "downstream") | null;
            /** @description as used, m */
            draught_m: number;
            governing_criterion: ("critical-ratio" | "depth-froude-number" | "bank-wave-height" | "receptor-wave-height" | "under-keel-clearance" | "drawdown" | "return-current" | "wake-wash" | "posted-limit" | "service-speed") | null;
            loading: ("laden" | "empty") | null;
            /** @description km/h */
            max_over_ground_kmh: number | null;
            /** @description kn */
            max_over_ground_kn: number | null;
            /** @description m/s */
            max_over_ground_mps: number | null;
            /** @description with the inputs as given, m/s */
            max_through_water_mps: number | null;
            /** @description share of the samples */
            no_safe_speed_ratio: number | null;
            outcome: ("limited" | "service-speed" | "no-safe-speed") | null;
            problem_code: string | null;
            problem_detail: string | null;
            samples: number | null;
            segment_id: string;
            /** @description of the governing station, m */
            station_chainage_m: number | null;
            vessel_class: string | null;
            vessel_index: number;
            water_level_m: number;
            waterway: string | null;
        } & {
            [key: string]: unknown;
        };
        /** @description What is not known exactly, and how it is sampled. */
        StudyUncertainty: {
            bank_distance_m?: {
                /** @description half of the range, m */
                half_range?: number;
                /** @description the caller's own mark, echoed unread */
                label?: string;
                /** @description standard deviation, m */
                sd?: number;
            };
            current_mps?: {
                /** @description half of the range, m/s */
                half_range?: number;
                /** @description the caller's own mark, echoed unread */
                label?: string;
                /** @description standard deviation, m/s */
                sd?: number;
            };
            depth_m?: {
                /** @description half of the range, m */
                half_range?: number;
                /** @description the caller's own mark, echoed unread */
                label?: string;
                /** @description standard deviation, m */
                sd?: number;
            };
            draught_m?: {
                /** @description half of the range, m */
                half_range?: number;
                /** @description the caller's own mark, echoed unread */
                label?: string;
                /** @description standard deviation, m */
                sd?: number;
            };
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description per cents of the samples that do not reach a speed; default 5, 50, 95 */
            percentiles?: number[];
            /** @description of each cell; default 200 */
            samples?: number;
            /** @description default 1 */
            seed?: number;
            /** @description standard deviation of the logarithm of the wave height; default the scatter of the calibration, else 0.4 (common practice) */
            wave_height_log_sd?: number;
            width_m?: {
                /** @description half of the range, m */
                half_range?: number;
                /** @description the caller's own mark, echoed unread */
                label?: string;
                /** @description standard deviation, m */
                sd?: number;
            };
        };
        /** @description Standard deviation or half range by input. */
        Uncertainty: {
            bank_distance_m?: {
                /** @description half of the range, m */
                half_range?: number;
                /** @description the caller's own mark, echoed unread */
                label?: string;
                /** @description standard deviation, m */
                sd?: number;
            };
            current_mps?: {
                /** @description half of the range, m/s */
                half_range?: number;
                /** @description the caller's own mark, echoed unread */
                label?: string;
                /** @description standard deviation, m/s */
                sd?: number;
            };
            depth_m?: {
                /** @description half of the range, m */
                half_range?: number;
                /** @description the caller's own mark, echoed unread */
                label?: string;
                /** @description standard deviation, m */
                sd?: number;
            };
            draught_m?: {
                /** @description half of the range, m */
                half_range?: number;
                /** @description the caller's own mark, echoed unread */
                label?: string;
                /** @description standard deviation, m */
                sd?: number;
            };
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description standard deviation of the logarithm of the wave height */
            wave_height_log_sd?: number;
            width_m?: {
                /** @description half of the range, m */
                half_range?: number;
                /** @description the caller's own mark, echoed unread */
                label?: string;
                /** @description standard deviation, m */
                sd?: number;
            };
        };
        /** @description Whether a plan comes out again; without a verdict until the job has succeeded. */
        Verification: {
            /** @description of the record as it is now */
            computed_hash?: string;
            /** @description the first 100 */
            differences?: {
                field: string;
                pointer: string;
                published: unknown;
                recomputed: unknown;
            }[];
            figures?: {
                compared: number;
                different: number;
                equal: number;
            };
            job: components["schemas"]["Job"];
            largest_difference_mps?: number;
            published_with?: {
                method_version: string;
                service_version: string;
            };
            recomputed_with?: {
                method_version: string;
                service_version: string;
            };
            /** @description as published */
            record_hash?: string;
            text?: string;
            /** @enum {string} */
            verdict?: "reproduced" | "methods-changed" | "not-reproduced" | "record-altered";
        };
        /** @description A vessel by class, by description, or a class with figures of its own. */
        Vessel: {
            /** @description m */
            beam_m?: number;
            /** @description displaced volume over length, beam and draught */
            block_coefficient?: number;
            /** @description id of a vessel class; its figures count where none is given here */
            class?: string;
            /** @description displaced volume at rest, m3 */
            displacement_m3?: number;
            /** @description m */
            draught_m?: number;
            /** @description stem to the start of the parallel middle body, m */
            entrance_length_m?: number;
            /** @enum {string} */
            hull?: "displacement" | "semi-displacement" | "planing";
            /** @description the caller's own mark, echoed unread */
            label?: string;
            /** @description waterline length, m */
            length_m?: number;
            /**
             * @description of a class; default laden
             * @enum {string}
             */
            loading?: "laden" | "empty";
            /** @description top speed through the water, km/h; give one of the units */
            max_speed_kmh?: number;
            /** @description top speed through the water, kn; give one of the units */
            max_speed_kn?: number;
            /** @description top speed through the water, m/s; give one of the units */
            max_speed_mps?: number;
            /** @description immersed midship section over beam and draught */
            midship_coefficient?: number;
            /** @description least speed through the water at which the rudder answers, km/h; give one of the units */
            min_steerage_speed_kmh?: number;
            /** @description least speed through the water at which the rudder answers, kn; give one of the units */
            min_steerage_speed_kn?: number;
            /** @description least speed through the water at which the rudder answers, m/s; give one of the units */
            min_steerage_speed_mps?: number;
        };
        /** @description A class of vessels with its figures and where they come from. */
        VesselClass: {
            basis: {
                [key: string]: "standard" | "typical";
            };
            built_in: boolean;
            dimensions: {
                empty?: {
                    beam_m: number;
                    /** @description A'', where the paper gives one */
                    blaauw_coefficient?: number;
                    block_coefficient: number;
                    draught_m: number;
                    entrance_length_m: number;
                    length_m: number;
                    midship_coefficient: number;
                    /** @description a_i, where the manual gives one */
                    rock_manual_coefficient?: number;
                };
                laden: {
                    beam_m: number;
                    /** @description A'', where the paper gives one */
                    blaauw_coefficient?: number;
                    block_coefficient: number;
                    draught_m: number;
                    entrance_length_m: number;
                    length_m: number;
                    midship_coefficient: number;
                    /** @description a_i, where the manual gives one */
                    rock_manual_coefficient?: number;
                };
            };
            /** @enum {string} */
            hull: "displacement" | "semi-displacement" | "planing";
            id: string;
            /** @description empty for a class of one draught */
            loadings: ("laden" | "empty")[];
            max_speed: components["schemas"]["Speed"];
            min_steerage_speed: components["schemas"]["Speed"];
            name: string;
            revision: number;
            source: string;
            /** @enum {string} */
            trade: "inland-cargo" | "inland-other" | "sea-going";
        };
        /** @description A class of vessels of the caller's own. */
        VesselClassInput: {
            basis?: {
                [key: string]: "standard" | "typical";
            };
            built_in?: boolean;
            dimensions: {
                empty?: {
                    /** @description m */
                    beam_m: number;
                    /** @description A'' of blaauw-1984 */
                    blaauw_coefficient?: number;
                    /** @description displaced volume over length, beam and draught */
                    block_coefficient: number;
                    /** @description m */
                    draught_m: number;
                    /** @description stem to the start of the parallel middle body, m */
                    entrance_length_m: number;
                    /** @description m */
                    length_m: number;
                    /** @description immersed midship section over beam and draught */
                    midship_coefficient: number;
                    /** @description a_i of rock-manual-2007 */
                    rock_manual_coefficient?: number;
                };
                laden: {
                    /** @description m */
                    beam_m: number;
                    /** @description A'' of blaauw-1984 */
                    blaauw_coefficient?: number;
                    /** @description displaced volume over length, beam and draught */
                    block_coefficient: number;
                    /** @description m */
                    draught_m: number;
                    /** @description stem to the start of the parallel middle body, m */
                    entrance_length_m: number;
                    /** @description m */
                    length_m: number;
                    /** @description immersed midship section over beam and draught */
                    midship_coefficient: number;
                    /** @description a_i of rock-manual-2007 */
                    rock_manual_coefficient?: number;
                };
            };
            /** @enum {string} */
            hull: "displacement" | "semi-displacement" | "planing";
            id?: string;
            /** @description the caller's own mark, echoed unread */
            label?: string;
            loadings?: string[];
            /** @description of a reply; counts where max_speed_* is left out */
            max_speed?: {
                /** @description km/h, which counts */
                kmh: number;
                kn?: number;
                mps?: number;
            };
            /** @description top speed through the water, km/h; give one of the units */
            max_speed_kmh?: number;
            /** @description top speed through the water, kn; give one of the units */
            max_speed_kn?: number;
            /** @description top speed through the water, m/s; give one of the units */
            max_speed_mps?: number;
            /** @description of a reply, likewise */
            min_steerage_speed?: {
                /** @description km/h, which counts */
                kmh: number;
                kn?: number;
                mps?: number;
            };
            /** @description least speed through the water at which the rudder answers, km/h; give one of the units */
            min_steerage_speed_kmh?: number;
            /** @description least speed through the water at which the rudder answers, kn; give one of the units */
            min_steerage_speed_kn?: number;
            /** @description least speed through the water at which the rudder answers, m/s; give one of the units */
            min_steerage_speed_mps?: number;
            name: string;
            revision?: number;
            source?: string;
            /**
             * @description default sea-going
             * @enum {string}
             */
            trade?: "inland-cargo" | "inland-other" | "sea-going";
        };
        /** @description A page of a list; the last page has no link `next`. */
        VesselClassList: {
            items: components["schemas"]["VesselClass"][];
            links: components["schemas"]["Link"][];
        };
        /** @description The vessel as it was computed with. */
        VesselUsed: {
            /** @description m */
            beam_m: number;
            /** @description displaced volume over length, beam and draught */
            block_coefficient: number;
            class?: string;
            /** @description displaced volume, m3 */
            displacement_m3: number;
            /** @description as used, m */
            draught_m: number;
            /** @description m */
            entrance_length_m: number;
            /** @enum {string} */
            hull: "displacement" | "semi-displacement" | "planing";
            /** @description m */
            length_m: number;
            /** @enum {string} */
            loading?: "laden" | "empty";
            max_speed: components["schemas"]["Speed"];
            /** @description immersed midship section over beam and draught */
            midship_coefficient: number;
            min_steerage_speed: components["schemas"]["Speed"];
        };
        WaveMethodValue: {
            applicable: boolean;
            /** @description applied to the height */
            factor?: number;
            /** @description at the nearer bank, m; a value out of range does not govern */
            height_m?: number;
            id: string;
            /** @description first speed at which it alone, in its range, reaches the limit of a bank */
            max_speed?: components["schemas"]["SpeedPair"];
            outside: {
                max?: number;
                min?: number;
                quantity: string;
                value: number | string;
            }[];
            reference: string;
        };
    };
    responses: never;
    parameters: never;
    requestBodies: never;
    headers: never;
    pathItems: never;
}
export type $defs = Record<string, never>;
export interface operations {
    getOverview: {
        parameters: {
            query?: {
                loading?: "laden" | "empty";
                sign_unit?: "km/h" | "kn" | "mph";
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                vessel_class?: string;
                water_level_m?: number;
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description The page. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "text/html": string;
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getLive: {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description The process answers. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Live"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getReady: {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description The service can answer, and from which versions. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Ready"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getMetrics: {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description Figures. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "text/plain": string;
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `role-too-small`: The role of the key does not allow this. */
            403: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getOpenApi: {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description The document. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": Record<string, never>;
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    createAdvisory: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody: {
            content: {
                "application/json": components["schemas"]["AdvisoryRequest"];
            };
        };
        responses: {
            /** @description A recommended maximum speed with its reasons, cautions and assumptions. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Advisory"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `unsupported-media-type`: The body is of a type that this path does not read. */
            415: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `impossible-input`: The fields are valid but cannot hold together. `too-few-passages`: There are too few measured passages. `units-doubtful`: The units of the measurements are doubtful. */
            422: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getAdvisoryLayer: {
        parameters: {
            query: {
                /** @description west,south,east,north in degrees; west above east crosses the antimeridian */
                bbox?: string;
                /** @description positive downstream, m/s; default 0 */
                current_mps?: number;
                direction?: "upstream" | "downstream";
                /** @description m; default the draught of the class */
                draught_m?: number;
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "geojson" | "json";
                gauge_id?: string;
                loading?: "laden" | "empty";
                sign_step?: number;
                sign_unit?: "km/h" | "kn" | "mph";
                /** @description id of a vessel class */
                vessel_class: string;
                /** @description above the datum, m; default 0 */
                water_level_m?: number;
                waterway?: string;
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description Every matching segment with its advisory in brief, not paged. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/geo+json": components["schemas"]["AdvisoryLayer"];
                    "application/json": components["schemas"]["AdvisoryLayer"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    createInverse: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody: {
            content: {
                "application/json": components["schemas"]["InverseRequest"];
            };
        };
        responses: {
            /** @description What an input would have to be for a speed to be within the recommendation. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Inverse"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `unsupported-media-type`: The body is of a type that this path does not read. */
            415: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `impossible-input`: The fields are valid but cannot hold together. `too-few-passages`: There are too few measured passages. `units-doubtful`: The units of the measurements are doubtful. */
            422: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    createAdvisoryMatrix: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "ndjson" | "csv";
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody: {
            content: {
                "application/json": components["schemas"]["MatrixRequest"];
            };
        };
        responses: {
            /** @description One row for each cell. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/x-ndjson": components["schemas"]["AdvisoryMatrixRow"];
                    "text/csv": string;
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `unsupported-media-type`: The body is of a type that this path does not read. */
            415: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `impossible-input`: The fields are valid but cannot hold together. `too-few-passages`: There are too few measured passages. `units-doubtful`: The units of the measurements are doubtful. */
            422: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    createSensitivity: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody: {
            content: {
                "application/json": components["schemas"]["SensitivityRequest"];
            };
        };
        responses: {
            /** @description Which uncertain input moves the answer most, largest swing first. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Sensitivity"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `unsupported-media-type`: The body is of a type that this path does not read. */
            415: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `impossible-input`: The fields are valid but cannot hold together. `too-few-passages`: There are too few measured passages. `units-doubtful`: The units of the measurements are doubtful. */
            422: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    streamAdvisories: {
        parameters: {
            query?: {
                /** @description of NDJSON; CSV is always compact */
                detail?: "full" | "compact";
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "ndjson" | "csv";
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody: {
            content: {
                "application/x-ndjson": components["schemas"]["AdvisoryRequest"];
                "text/csv": string;
            };
        };
        responses: {
            /** @description One line for each line in. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/x-ndjson": components["schemas"]["AdvisoryLine"] | components["schemas"]["ProblemLine"] | components["schemas"]["AdvisoryRow"];
                    "text/csv": string;
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `unsupported-media-type`: The body is of a type that this path does not read. */
            415: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    listCalibrations: {
        parameters: {
            query?: {
                /** @description as the link `next` has it */
                cursor?: string;
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
                /** @description items on a page, default 100 */
                limit?: number;
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description A page of a list; the last page has no link `next`. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["CalibrationList"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    createCalibration: {
        parameters: {
            query?: {
                /** @description the heights are in metres although the ratio looks like feet; default false */
                confirm_units?: boolean;
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
                /** @description separated by commas; default all */
                method_ids?: ("rock-manual-2007" | "blaauw-1984" | "weggel-sorensen-1986" | "kriebel-seelig-2005" | "gates-herbich-1977" | "bhowmik-1991" | "maynord-2005")[];
                /** @description with rows as NDJSON or CSV: required */
                name?: string;
                /** @description of the resampling; the same gives the same figures; default 1 */
                seed?: number;
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                segment_id?: string;
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody: {
            content: {
                "application/json": components["schemas"]["CalibrationRequest"];
                "application/x-ndjson": components["schemas"]["MeasuredPassage"];
                "text/csv": string;
            };
        };
        responses: {
            /** @description What measured waves say of the methods on one water. */
            201: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Calibration"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `role-too-small`: The role of the key does not allow this. */
            403: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `request-timeout`: The request took too long to arrive. */
            408: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `unsupported-media-type`: The body is of a type that this path does not read. */
            415: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `impossible-input`: The fields are valid but cannot hold together. `too-few-passages`: There are too few measured passages. `units-doubtful`: The units of the measurements are doubtful. */
            422: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getCalibration: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description A calibration with the passages it was made from. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["FullCalibration"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    deleteCalibration: {
        parameters: {
            query?: never;
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description It is deleted. */
            204: {
                headers: {
                    [name: string]: unknown;
                };
                content?: never;
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `role-too-small`: The role of the key does not allow this. */
            403: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `built-in-class`: Built-in vessel classes cannot be changed. `in-use`: Something still refers to it. `study-not-finished`: The study has not succeeded. `limit-plan-published`: The limit plan is published. `number-taken`: Another limit plan has this number. */
            409: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getCalibrationFit: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "svg";
                /** @description default the recommended one */
                method_id?: "rock-manual-2007" | "blaauw-1984" | "weggel-sorensen-1986" | "kriebel-seelig-2005" | "gates-herbich-1977" | "bhowmik-1991" | "maynord-2005";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description The drawing. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "image/svg+xml": string;
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getCalibrationResiduals: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "svg";
                /** @description default the recommended one */
                method_id?: "rock-manual-2007" | "blaauw-1984" | "weggel-sorensen-1986" | "kriebel-seelig-2005" | "gates-herbich-1977" | "bhowmik-1991" | "maynord-2005";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description The drawing. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "image/svg+xml": string;
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getCalibrationSheet: {
        parameters: {
            query?: never;
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description The page. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "text/html": string;
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    createEffects: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody: {
            content: {
                "application/json": components["schemas"]["EffectsRequest"];
            };
        };
        responses: {
            /** @description What a speed does, and whether it is faster than advised. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Assessment"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `unsupported-media-type`: The body is of a type that this path does not read. */
            415: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `impossible-input`: The fields are valid but cannot hold together. `too-few-passages`: There are too few measured passages. `units-doubtful`: The units of the measurements are doubtful. */
            422: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    listLimitPlans: {
        parameters: {
            query?: {
                /** @description as the link `next` has it */
                cursor?: string;
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
                /** @description items on a page, default 100 */
                limit?: number;
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description A page of a list; the last page has no link `next`. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["LimitPlanList"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    createLimitPlan: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody: {
            content: {
                "application/json": components["schemas"]["LimitPlanRequest"];
            };
        };
        responses: {
            /** @description Proposed limits, and what they follow from. */
            201: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["LimitPlan"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `role-too-small`: The role of the key does not allow this. */
            403: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `request-timeout`: The request took too long to arrive. */
            408: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `built-in-class`: Built-in vessel classes cannot be changed. `in-use`: Something still refers to it. `study-not-finished`: The study has not succeeded. `limit-plan-published`: The limit plan is published. `number-taken`: Another limit plan has this number. */
            409: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `unsupported-media-type`: The body is of a type that this path does not read. */
            415: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `impossible-input`: The fields are valid but cannot hold together. `too-few-passages`: There are too few measured passages. `units-doubtful`: The units of the measurements are doubtful. */
            422: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getLimitPlan: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json" | "geojson" | "csv";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description The plan. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/geo+json": components["schemas"]["LimitPlanCollection"];
                    "application/json": components["schemas"]["LimitPlan"];
                    "text/csv": string;
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    deleteLimitPlan: {
        parameters: {
            query?: never;
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description It is deleted. */
            204: {
                headers: {
                    [name: string]: unknown;
                };
                content?: never;
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `role-too-small`: The role of the key does not allow this. */
            403: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `built-in-class`: Built-in vessel classes cannot be changed. `in-use`: Something still refers to it. `study-not-finished`: The study has not succeeded. `limit-plan-published`: The limit plan is published. `number-taken`: Another limit plan has this number. */
            409: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getLimitPlanEvidence: {
        parameters: {
            query?: never;
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description The pages. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "text/html": string;
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getLimitPlanNotice: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description A proposal in code words of the Notices to Skippers standard. It is no official message: an authority makes that. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Notice"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    publishLimitPlan: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody: {
            content: {
                "application/json": components["schemas"]["PublishRequest"];
            };
        };
        responses: {
            /** @description The answer. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Publication"];
                };
            };
            /** @description The answer. */
            201: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Publication"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `role-too-small`: The role of the key does not allow this. */
            403: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `built-in-class`: Built-in vessel classes cannot be changed. `in-use`: Something still refers to it. `study-not-finished`: The study has not succeeded. `limit-plan-published`: The limit plan is published. `number-taken`: Another limit plan has this number. */
            409: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `unsupported-media-type`: The body is of a type that this path does not read. */
            415: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `impossible-input`: The fields are valid but cannot hold together. `too-few-passages`: There are too few measured passages. `units-doubtful`: The units of the measurements are doubtful. */
            422: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getLimitPlanRecord: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description Everything a plan rests on, as one document. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["LimitPlanRecord"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getLimitPlanVerification: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description Whether a plan comes out again; without a verdict until the job has succeeded. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Verification"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    verifyLimitPlan: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description Work that goes on after the reply. */
            202: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Job"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `role-too-small`: The role of the key does not allow this. */
            403: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    listMethods: {
        parameters: {
            query?: {
                /** @description as the link `next` has it */
                cursor?: string;
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
                kind?: "wave-height" | "squat" | "primary-wave" | "critical-speed" | "wake-geometry" | "bank-stability";
                /** @description items on a page, default 100 */
                limit?: number;
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description A page of a list; the last page has no link `next`. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["MethodList"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getMethod: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description A published method: what it says, where it holds, where to read it. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Method"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    checkPassages: {
        parameters: {
            query?: {
                /** @description positive downstream, m/s, where a row does not say; default 0 */
                current_mps?: number;
                /** @description default events; the summary comes last in each */
                detail?: "reports" | "events" | "summary";
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "ndjson" | "csv";
                /** @description between reports that still belong together, and that rows may go back in time, s; default 600 */
                max_gap_s?: number;
                /** @description least number of consecutive reports of an event; default 2 */
                min_event_reports?: number;
                /** @description where the vessel is taken to be by the maximum that the verdict uses; default actual */
                position?: "actual" | "sailing-line";
                /** @description by which a maximum may be exceeded without being said to be, kn; default 0.5 */
                tolerance_kn?: number;
                /** @description likewise, m */
                tow_beam_m?: number;
                /** @description likewise, m */
                tow_draught_m?: number;
                /** @description convoy of ship types 31, 32 and 52, m */
                tow_length_m?: number;
                /** @description above the datum, m, where a row does not say; default 0 */
                water_level_m?: number;
                /** @description only its segments; default all */
                waterway?: string;
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody: {
            content: {
                "application/x-ndjson": {
                    [key: string]: unknown;
                };
                "text/csv": string;
            };
        };
        responses: {
            /** @description Reports, events and the summary. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/x-ndjson": components["schemas"]["PassageReport"] | components["schemas"]["PassageEvent"] | components["schemas"]["PassageSummary"];
                    "text/csv": string;
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `unsupported-media-type`: The body is of a type that this path does not read. */
            415: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getPassageColumns: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description Fields of a log of position reports. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["PassageColumns"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    listProblems: {
        parameters: {
            query?: never;
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description A page of a list; the last page has no link `next`. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["ProblemTypeList"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getProblem: {
        parameters: {
            query?: never;
            header?: never;
            path: {
                /** @description code of the problem */
                slug: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description A kind of problem and what to do about it. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["ProblemType"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    listSegments: {
        parameters: {
            query?: {
                /** @description west,south,east,north in degrees; west above east crosses the antimeridian */
                bbox?: string;
                /** @description as the link `next` has it */
                cursor?: string;
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "geojson" | "json";
                gauge_id?: string;
                /** @description items on a page, default 100 */
                limit?: number;
                waterway?: string;
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description The answer. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/geo+json": components["schemas"]["SegmentCollection"];
                    "application/json": components["schemas"]["SegmentCollection"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getSegment: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "geojson" | "json";
                revision?: number;
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description A segment: its sailing line, drawn downstream, and the segment object. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/geo+json": components["schemas"]["SegmentFeature"];
                    "application/json": components["schemas"]["SegmentFeature"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    putSegment: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "geojson" | "json";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody: {
            content: {
                "application/json": components["schemas"]["SegmentFeatureInput"];
            };
        };
        responses: {
            /** @description A segment: its sailing line, drawn downstream, and the segment object. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/geo+json": components["schemas"]["SegmentFeature"];
                    "application/json": components["schemas"]["SegmentFeature"];
                };
            };
            /** @description A segment: its sailing line, drawn downstream, and the segment object. */
            201: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/geo+json": components["schemas"]["SegmentFeature"];
                    "application/json": components["schemas"]["SegmentFeature"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `role-too-small`: The role of the key does not allow this. */
            403: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `stale-revision`: The revision in If-Match is not the current one. */
            412: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `unsupported-media-type`: The body is of a type that this path does not read. */
            415: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `impossible-input`: The fields are valid but cannot hold together. `too-few-passages`: There are too few measured passages. `units-doubtful`: The units of the measurements are doubtful. */
            422: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `revision-required`: The request must say which revision it changes. */
            428: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    deleteSegment: {
        parameters: {
            query?: never;
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description It is deleted. */
            204: {
                headers: {
                    [name: string]: unknown;
                };
                content?: never;
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `role-too-small`: The role of the key does not allow this. */
            403: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `stale-revision`: The revision in If-Match is not the current one. */
            412: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `revision-required`: The request must say which revision it changes. */
            428: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getSegmentAdvisory: {
        parameters: {
            query: {
                /** @description positive downstream, m/s; default 0 */
                current_mps?: number;
                direction?: "upstream" | "downstream";
                /** @description m; default the draught of the class */
                draught_m?: number;
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
                loading?: "laden" | "empty";
                sign_step?: number;
                sign_unit?: "km/h" | "kn" | "mph";
                /** @description id of a vessel class */
                vessel_class: string;
                /** @description above the datum, m; default 0 */
                water_level_m?: number;
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description A recommended maximum speed with its reasons, cautions and assumptions. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Advisory"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `impossible-input`: The fields are valid but cannot hold together. `too-few-passages`: There are too few measured passages. `units-doubtful`: The units of the measurements are doubtful. */
            422: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    listSegmentRevisions: {
        parameters: {
            query?: {
                /** @description as the link `next` has it */
                cursor?: string;
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
                /** @description items on a page, default 100 */
                limit?: number;
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description A page of a list; the last page has no link `next`. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["SegmentRevisionList"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getSegmentSheet: {
        parameters: {
            query: {
                /** @description positive downstream, m/s; default 0 */
                current_mps?: number;
                direction?: "upstream" | "downstream";
                /** @description m; default the draught of the class */
                draught_m?: number;
                loading?: "laden" | "empty";
                sign_step?: number;
                sign_unit?: "km/h" | "kn" | "mph";
                /** @description id of a vessel class */
                vessel_class: string;
                /** @description above the datum, m; default 0 */
                water_level_m?: number;
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description The page. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "text/html": string;
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `impossible-input`: The fields are valid but cannot hold together. `too-few-passages`: There are too few measured passages. `units-doubtful`: The units of the measurements are doubtful. */
            422: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getSegmentSpeedCurve: {
        parameters: {
            query: {
                /** @description positive downstream, m/s; default 0 */
                current_mps?: number;
                direction?: "upstream" | "downstream";
                /** @description m; default the draught of the class */
                draught_m?: number;
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json" | "svg";
                loading?: "laden" | "empty";
                /** @description default 60 */
                points?: number;
                sign_step?: number;
                sign_unit?: "km/h" | "kn" | "mph";
                /** @description id of a vessel class */
                vessel_class: string;
                /** @description above the datum, m; default 0 */
                water_level_m?: number;
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description The curve. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["SegmentSpeedCurve"];
                    "image/svg+xml": string;
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `impossible-input`: The fields are valid but cannot hold together. `too-few-passages`: There are too few measured passages. `units-doubtful`: The units of the measurements are doubtful. */
            422: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    importSegments: {
        parameters: {
            query?: {
                /** @description read and tell, and write nothing; default false */
                dry_run?: boolean;
                /** @description what becomes of foreign properties: refused, or kept as attributes; default reject */
                unknown?: "reject" | "keep";
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody: {
            content: {
                "application/json": components["schemas"]["SegmentCollectionInput"];
            };
        };
        responses: {
            /** @description What an import made, or would make. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["SegmentImport"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `role-too-small`: The role of the key does not allow this. */
            403: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `unsupported-media-type`: The body is of a type that this path does not read. */
            415: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `impossible-input`: The fields are valid but cannot hold together. `too-few-passages`: There are too few measured passages. `units-doubtful`: The units of the measurements are doubtful. */
            422: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    listStudies: {
        parameters: {
            query?: {
                /** @description as the link `next` has it */
                cursor?: string;
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
                /** @description items on a page, default 100 */
                limit?: number;
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description A page of a list; the last page has no link `next`. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["JobList"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    createStudy: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody: {
            content: {
                "application/json": components["schemas"]["StudyRequest"];
            };
        };
        responses: {
            /** @description Work that goes on after the reply. */
            202: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Job"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `role-too-small`: The role of the key does not allow this. */
            403: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `request-timeout`: The request took too long to arrive. */
            408: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `unsupported-media-type`: The body is of a type that this path does not read. */
            415: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `impossible-input`: The fields are valid but cannot hold together. `too-few-passages`: There are too few measured passages. `units-doubtful`: The units of the measurements are doubtful. */
            422: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getStudy: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description Work that goes on after the reply. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Job"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    deleteStudy: {
        parameters: {
            query?: never;
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description Work that goes on after the reply. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["Job"];
                };
            };
            /** @description It is deleted. */
            204: {
                headers: {
                    [name: string]: unknown;
                };
                content?: never;
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `role-too-small`: The role of the key does not allow this. */
            403: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `built-in-class`: Built-in vessel classes cannot be changed. `in-use`: Something still refers to it. `study-not-finished`: The study has not succeeded. `limit-plan-published`: The limit plan is published. `number-taken`: Another limit plan has this number. */
            409: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getStudyResults: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "ndjson" | "csv";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description One row for each cell. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/x-ndjson": components["schemas"]["StudyRow"];
                    "text/csv": string;
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `built-in-class`: Built-in vessel classes cannot be changed. `in-use`: Something still refers to it. `study-not-finished`: The study has not succeeded. `limit-plan-published`: The limit plan is published. `number-taken`: Another limit plan has this number. */
            409: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    listVesselClasses: {
        parameters: {
            query?: {
                /** @description as the link `next` has it */
                cursor?: string;
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
                /** @description items on a page, default 100 */
                limit?: number;
            };
            header?: never;
            path?: never;
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description A page of a list; the last page has no link `next`. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["VesselClassList"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    getVesselClass: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description A class of vessels with its figures and where they come from. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["VesselClass"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    putVesselClass: {
        parameters: {
            query?: {
                /** @description form of the reply; overrides the Accept header, for links */
                format?: "json";
            };
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody: {
            content: {
                "application/json": components["schemas"]["VesselClassInput"];
            };
        };
        responses: {
            /** @description A class of vessels with its figures and where they come from. */
            200: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["VesselClass"];
                };
            };
            /** @description A class of vessels with its figures and where they come from. */
            201: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/json": components["schemas"]["VesselClass"];
                };
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `role-too-small`: The role of the key does not allow this. */
            403: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `not-acceptable`: The reply is not available in that form. */
            406: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `built-in-class`: Built-in vessel classes cannot be changed. `in-use`: Something still refers to it. `study-not-finished`: The study has not succeeded. `limit-plan-published`: The limit plan is published. `number-taken`: Another limit plan has this number. */
            409: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `stale-revision`: The revision in If-Match is not the current one. */
            412: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `payload-too-large`: The body is too large. `too-many-cells`: The request asks for too many combinations. `line-too-long`: A line is too long. */
            413: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `unsupported-media-type`: The body is of a type that this path does not read. */
            415: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `revision-required`: The request must say which revision it changes. */
            428: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
    deleteVesselClass: {
        parameters: {
            query?: never;
            header?: never;
            path: {
                /** @description 1 to 64 of A-Z a-z 0-9 . _ -, the first a letter or digit */
                id: string;
            };
            cookie?: never;
        };
        requestBody?: never;
        responses: {
            /** @description It is deleted. */
            204: {
                headers: {
                    [name: string]: unknown;
                };
                content?: never;
            };
            /** @description `invalid-request`: The request does not match the schema. `malformed-json`: The body is not JSON. `malformed-csv`: The body is not CSV with a header. */
            400: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `key-required`: A key is required. */
            401: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `role-too-small`: The role of the key does not allow this. */
            403: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `route-not-found`: There is no such path. `segment-not-found`: There is no such segment. `vessel-class-not-found`: There is no such vessel class. `revision-not-found`: There is no such revision. `study-not-found`: There is no such study. `limit-plan-not-found`: There is no such limit plan. `calibration-not-found`: There is no such calibration. `method-not-found`: There is no such method. `problem-not-found`: There is no such problem type. */
            404: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `built-in-class`: Built-in vessel classes cannot be changed. `in-use`: Something still refers to it. `study-not-finished`: The study has not succeeded. `limit-plan-published`: The limit plan is published. `number-taken`: Another limit plan has this number. */
            409: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `stale-revision`: The revision in If-Match is not the current one. */
            412: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `revision-required`: The request must say which revision it changes. */
            428: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description `overloaded`: The service is busy. `store-unavailable`: The database does not answer. `storage-full`: The storage of the database is full. `stopping`: The service is stopping. */
            503: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
            /** @description Why the request was refused; any status from 400 on that is not listed. */
            default: {
                headers: {
                    [name: string]: unknown;
                };
                content: {
                    "application/problem+json": components["schemas"]["Problem"];
                };
            };
        };
    };
}

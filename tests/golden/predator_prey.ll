define i64 @uq_start(ptr noalias %lanes, ptr noalias readonly %settings) #0 {
entry:
  ; what depends on the inputs alone, once per member
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 20
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %lanes, i64 22
  %v4 = load <8 x double>, ptr %v3, align 64
  %v5 = getelementptr inbounds <8 x double>, ptr %lanes, i64 23
  %v6 = load <8 x double>, ptr %v5, align 64
  %v7 = fneg <8 x double> %v2
  %v8 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  store <8 x double> %v7, ptr %v8, align 64
  %v9 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  store <8 x double> %v4, ptr %v9, align 64
  %v10 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v4)
  %v11 = getelementptr inbounds <8 x double>, ptr %lanes, i64 29
  store <8 x double> %v10, ptr %v11, align 64
  %v12 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  store <8 x double> %v6, ptr %v12, align 64
  %v13 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v6)
  %v14 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  store <8 x double> %v13, ptr %v14, align 64
  ; first rates and first step
  %v15 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v16 = load <8 x double>, ptr %v15, align 64
  %v17 = getelementptr inbounds <8 x double>, ptr %lanes, i64 18
  %v18 = load <8 x double>, ptr %v17, align 64
  %v19 = getelementptr inbounds <8 x double>, ptr %lanes, i64 19
  %v20 = load <8 x double>, ptr %v19, align 64
  %v21 = getelementptr inbounds <8 x double>, ptr %lanes, i64 21
  %v22 = load <8 x double>, ptr %v21, align 64
  %v23 = fmul <8 x double> %v18, %v4
  %v24 = fmul <8 x double> %v20, %v4
  %v25 = fneg <8 x double> %v24
  %v26 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v6, <8 x double> %v23)
  %v27 = fmul <8 x double> %v7, %v6
  %v28 = fmul <8 x double> %v22, %v4
  %v29 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v28, <8 x double> %v6, <8 x double> %v27)
  %v30 = getelementptr inbounds <8 x double>, ptr %lanes, i64 27
  store <8 x double> %v26, ptr %v30, align 64
  %v31 = getelementptr inbounds <8 x double>, ptr %lanes, i64 28
  store <8 x double> %v29, ptr %v31, align 64
  %v32 = getelementptr inbounds <8 x double>, ptr %lanes, i64 2
  %v33 = load <8 x double>, ptr %v32, align 64
  %v34 = fsub <8 x double> %v33, %v16
  %v35 = getelementptr inbounds <8 x double>, ptr %settings, i64 0
  %v36 = load <8 x double>, ptr %v35, align 64
  %v37 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v4)
  %v38 = getelementptr inbounds <8 x double>, ptr %settings, i64 7
  %v39 = load <8 x double>, ptr %v38, align 64
  %v40 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v37, <8 x double> %v39)
  %v41 = fdiv <8 x double> %v4, %v40
  %v42 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v41, <8 x double> %v41, <8 x double> splat (double 0x0000000000000000))
  %v43 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v6)
  %v44 = getelementptr inbounds <8 x double>, ptr %settings, i64 8
  %v45 = load <8 x double>, ptr %v44, align 64
  %v46 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v43, <8 x double> %v45)
  %v47 = fdiv <8 x double> %v6, %v46
  %v48 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v47, <8 x double> %v47, <8 x double> %v42)
  %v49 = fmul <8 x double> %v48, splat (double 0x3FE0000000000000)
  %v50 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v49)
  %v51 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v4)
  %v52 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v51, <8 x double> %v39)
  %v53 = fdiv <8 x double> %v26, %v52
  %v54 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v53, <8 x double> %v53, <8 x double> splat (double 0x0000000000000000))
  %v55 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v6)
  %v56 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v55, <8 x double> %v45)
  %v57 = fdiv <8 x double> %v29, %v56
  %v58 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v57, <8 x double> %v57, <8 x double> %v54)
  %v59 = fmul <8 x double> %v58, splat (double 0x3FE0000000000000)
  %v60 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v59)
  %v61 = fcmp olt <8 x double> %v50, splat (double 0x3EE4F8B588E368F1)
  %v62 = fcmp olt <8 x double> %v60, splat (double 0x3EE4F8B588E368F1)
  %v63 = or <8 x i1> %v61, %v62
  %v64 = fmul <8 x double> %v34, splat (double 0x3EB0C6F7A0B5ED8D)
  %v65 = fmul <8 x double> splat (double 0x3F847AE147AE147B), %v50
  %v66 = fdiv <8 x double> %v65, %v60
  %v67 = select <8 x i1> %v63, <8 x double> %v64, <8 x double> %v66
  %v68 = fcmp olt <8 x double> %v67, %v34
  %v69 = select <8 x i1> %v68, <8 x double> %v67, <8 x double> %v34
  %v70 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v69, <8 x double> %v26, <8 x double> %v4)
  %v71 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v69, <8 x double> %v29, <8 x double> %v6)
  %v72 = fmul <8 x double> %v18, %v70
  %v73 = fmul <8 x double> %v20, %v70
  %v74 = fneg <8 x double> %v73
  %v75 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v74, <8 x double> %v71, <8 x double> %v72)
  %v76 = fmul <8 x double> %v7, %v71
  %v77 = fmul <8 x double> %v22, %v70
  %v78 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v77, <8 x double> %v71, <8 x double> %v76)
  %v79 = fsub <8 x double> %v75, %v26
  %v80 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v4)
  %v81 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v80, <8 x double> %v39)
  %v82 = fdiv <8 x double> %v79, %v81
  %v83 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v82, <8 x double> %v82, <8 x double> splat (double 0x0000000000000000))
  %v84 = fsub <8 x double> %v78, %v29
  %v85 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v6)
  %v86 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v85, <8 x double> %v45)
  %v87 = fdiv <8 x double> %v84, %v86
  %v88 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v87, <8 x double> %v87, <8 x double> %v83)
  %v89 = fmul <8 x double> %v88, splat (double 0x3FE0000000000000)
  %v90 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v89)
  %v91 = fdiv <8 x double> %v90, %v69
  %v92 = fcmp ogt <8 x double> %v60, %v91
  %v93 = select <8 x i1> %v92, <8 x double> %v60, <8 x double> %v91
  %v94 = fcmp olt <8 x double> %v93, splat (double 0x73D658E3AB795204)
  %v95 = select <8 x i1> %v94, <8 x double> %v93, <8 x double> splat (double 0x73D658E3AB795204)
  %v96 = fcmp ogt <8 x double> %v95, splat (double 0x0C06E93F5DA2824C)
  %v97 = select <8 x i1> %v96, <8 x double> %v95, <8 x double> splat (double 0x0C06E93F5DA2824C)
  %v98 = bitcast <8 x double> %v97 to <8 x i64>
  %v99 = lshr <8 x i64> %v98, splat (i64 52)
  %v100 = or <8 x i64> %v99, splat (i64 4841369599423283200)
  %v101 = bitcast <8 x i64> %v100 to <8 x double>
  %v102 = fsub <8 x double> %v101, splat (double 0x43300000000003FF)
  %v103 = and <8 x i64> %v98, splat (i64 4503599627370495)
  %v104 = or <8 x i64> %v103, splat (i64 4607182418800017408)
  %v105 = bitcast <8 x i64> %v104 to <8 x double>
  %v106 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA604C059210386), <8 x double> %v105, <8 x double> splat (double 0xBFD9C2C7904CE9BE))
  %v107 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v106, <8 x double> %v105, <8 x double> splat (double 0x3FF96E7C9A8551E4))
  %v108 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v107, <8 x double> %v105, <8 x double> splat (double 0xC00BEB4578B01506))
  %v109 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v108, <8 x double> %v105, <8 x double> splat (double 0x401431010187BF7D))
  %v110 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v109, <8 x double> %v105, <8 x double> splat (double 0xC0064DAC40654ADD))
  %v111 = fadd <8 x double> %v102, %v110
  %v112 = fmul <8 x double> %v111, splat (double 0xBFC999999999999A)
  %v113 = fadd <8 x double> %v112, splat (double 0xBFF542A5A12E1C5A)
  %v114 = fadd <8 x double> %v113, splat (double 0x4338000000000000)
  %v115 = fsub <8 x double> %v114, splat (double 0x4338000000000000)
  %v116 = fsub <8 x double> %v113, %v115
  %v117 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F83CBFA3EF5DF15), <8 x double> %v116, <8 x double> splat (double 0x3FACA1CEF240FA9C))
  %v118 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v117, <8 x double> %v116, <8 x double> splat (double 0x3FCEBFA4C61D8623))
  %v119 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v118, <8 x double> %v116, <8 x double> splat (double 0x3FE62E0C17657753))
  %v120 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v119, <8 x double> %v116, <8 x double> splat (double 0x3FF0000000000000))
  %v121 = bitcast <8 x double> %v114 to <8 x i64>
  %v122 = shl <8 x i64> %v121, splat (i64 52)
  %v123 = bitcast <8 x double> %v120 to <8 x i64>
  %v124 = add <8 x i64> %v123, %v122
  %v125 = bitcast <8 x i64> %v124 to <8 x double>
  %v126 = fmul <8 x double> %v34, splat (double 0x3EB0C6F7A0B5ED8D)
  %v127 = fmul <8 x double> %v69, splat (double 0x3F50624DD2F1A9FC)
  %v128 = fcmp ogt <8 x double> %v126, %v127
  %v129 = select <8 x i1> %v128, <8 x double> %v126, <8 x double> %v127
  %v130 = fcmp ole <8 x double> %v93, splat (double 0x3CD203AF9EE75616)
  %v131 = select <8 x i1> %v130, <8 x double> %v129, <8 x double> %v125
  %v132 = fmul <8 x double> splat (double 0x4059000000000000), %v69
  %v133 = fcmp olt <8 x double> %v132, %v131
  %v134 = select <8 x i1> %v133, <8 x double> %v132, <8 x double> %v131
  %v135 = fcmp olt <8 x double> %v134, %v34
  %v136 = select <8 x i1> %v135, <8 x double> %v134, <8 x double> %v34
  %v137 = fcmp ord <8 x double> %v91, %v91
  %v138 = select <8 x i1> %v137, <8 x double> %v136, <8 x double> %v69
  %v139 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  store <8 x double> %v138, ptr %v139, align 64
  %v140 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  store <8 x double> splat (double 0xC03A934F0979A371), ptr %v140, align 64
  %v141 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  store <8 x double> splat (double 0x0000000000000000), ptr %v141, align 64
  %v142 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  store <8 x double> splat (double 0x0000000000000000), ptr %v142, align 64
  %v143 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  store <8 x double> splat (double 0x0000000000000000), ptr %v143, align 64
  %v144 = getelementptr inbounds <8 x double>, ptr %lanes, i64 13
  store <8 x double> splat (double 0x0000000000000000), ptr %v144, align 64
  %v145 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  store <8 x double> splat (double 0x0000000000000000), ptr %v145, align 64
  %v146 = getelementptr inbounds <8 x double>, ptr %lanes, i64 10
  store <8 x double> splat (double 0x3FF0000000000000), ptr %v146, align 64
  %v147 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  store <8 x double> %v16, ptr %v147, align 64
  %v148 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  store <8 x double> splat (double 0x3FF0000000000000), ptr %v148, align 64
  %v149 = getelementptr inbounds <8 x double>, ptr %settings, i64 9
  %v150 = load <8 x double>, ptr %v149, align 64
  %v151 = fcmp olt <8 x double> %v4, %v150
  %v152 = or <8 x i1> zeroinitializer, %v151
  %v153 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v154 = load <8 x double>, ptr %v153, align 64
  %v155 = fcmp ogt <8 x double> %v4, %v154
  %v156 = or <8 x i1> %v152, %v155
  %v157 = getelementptr inbounds <8 x double>, ptr %settings, i64 10
  %v158 = load <8 x double>, ptr %v157, align 64
  %v159 = fcmp olt <8 x double> %v6, %v158
  %v160 = or <8 x i1> %v156, %v159
  %v161 = getelementptr inbounds <8 x double>, ptr %settings, i64 12
  %v162 = load <8 x double>, ptr %v161, align 64
  %v163 = fcmp ogt <8 x double> %v6, %v162
  %v164 = or <8 x i1> %v160, %v163
  %v165 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v4, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x0000000000000000))
  %v166 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> splat (double 0x0000000000000000), <8 x double> %v165)
  %v167 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v6, <8 x double> splat (double 0x0000000000000000), <8 x double> %v166)
  %v168 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v29, <8 x double> splat (double 0x0000000000000000), <8 x double> %v167)
  %v169 = fcmp uno <8 x double> %v168, %v168
  %v170 = select <8 x i1> %v164, <8 x double> splat (double 0x4000000000000000), <8 x double> splat (double 0x0000000000000000)
  %v171 = select <8 x i1> %v169, <8 x double> splat (double 0x4008000000000000), <8 x double> %v170
  %v172 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v171, ptr %v172, align 64
  %v173 = or <8 x i1> %v164, %v169
  %v174 = bitcast <8 x i1> %v173 to i8
  %v175 = zext i8 %v174 to i64
  ret i64 %v175
}

define i64 @uq_step(ptr noalias %lanes, ptr noalias readonly %settings) #0 {
entry:
  ; length of the attempt: proposed, stretched or halved towards the end of the segment
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  %v4 = load <8 x double>, ptr %v3, align 64
  %v5 = getelementptr inbounds <8 x double>, ptr %lanes, i64 2
  %v6 = load <8 x double>, ptr %v5, align 64
  %v7 = fsub <8 x double> %v6, %v2
  %v8 = fmul <8 x double> %v4, splat (double 0x3FF028F5C28F5C29)
  %v9 = fcmp oge <8 x double> %v8, %v7
  %v10 = fadd <8 x double> %v4, %v4
  %v11 = fcmp oge <8 x double> %v10, %v7
  %v12 = fmul <8 x double> %v7, splat (double 0x3FE0000000000000)
  %v13 = select <8 x i1> %v11, <8 x double> %v12, <8 x double> %v4
  %v14 = select <8 x i1> %v9, <8 x double> %v7, <8 x double> %v13
  %v15 = fadd <8 x double> %v2, %v14
  %v16 = select <8 x i1> %v9, <8 x double> %v6, <8 x double> %v15
  ; stages
  %v17 = getelementptr inbounds <8 x double>, ptr %lanes, i64 27
  %v18 = load <8 x double>, ptr %v17, align 64
  %v19 = fmul <8 x double> splat (double 0x3FC999999999999A), %v18
  %v20 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  %v21 = load <8 x double>, ptr %v20, align 64
  %v22 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v19, <8 x double> %v21)
  %v23 = getelementptr inbounds <8 x double>, ptr %lanes, i64 28
  %v24 = load <8 x double>, ptr %v23, align 64
  %v25 = fmul <8 x double> splat (double 0x3FC999999999999A), %v24
  %v26 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  %v27 = load <8 x double>, ptr %v26, align 64
  %v28 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v25, <8 x double> %v27)
  %v29 = getelementptr inbounds <8 x double>, ptr %lanes, i64 18
  %v30 = load <8 x double>, ptr %v29, align 64
  %v31 = getelementptr inbounds <8 x double>, ptr %lanes, i64 19
  %v32 = load <8 x double>, ptr %v31, align 64
  %v33 = getelementptr inbounds <8 x double>, ptr %lanes, i64 21
  %v34 = load <8 x double>, ptr %v33, align 64
  %v35 = fmul <8 x double> %v30, %v22
  %v36 = fmul <8 x double> %v32, %v22
  %v37 = fneg <8 x double> %v36
  %v38 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v37, <8 x double> %v28, <8 x double> %v35)
  %v39 = getelementptr inbounds <8 x double>, ptr %lanes, i64 24
  %v40 = load <8 x double>, ptr %v39, align 64
  %v41 = fmul <8 x double> %v40, %v28
  %v42 = fmul <8 x double> %v34, %v22
  %v43 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v42, <8 x double> %v28, <8 x double> %v41)
  %v44 = fmul <8 x double> splat (double 0x3FB3333333333333), %v18
  %v45 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FCCCCCCCCCCCCCD), <8 x double> %v38, <8 x double> %v44)
  %v46 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v45, <8 x double> %v21)
  %v47 = fmul <8 x double> splat (double 0x3FB3333333333333), %v24
  %v48 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FCCCCCCCCCCCCCD), <8 x double> %v43, <8 x double> %v47)
  %v49 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v48, <8 x double> %v27)
  %v50 = fmul <8 x double> %v30, %v46
  %v51 = fmul <8 x double> %v32, %v46
  %v52 = fneg <8 x double> %v51
  %v53 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v52, <8 x double> %v49, <8 x double> %v50)
  %v54 = fmul <8 x double> %v40, %v49
  %v55 = fmul <8 x double> %v34, %v46
  %v56 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v55, <8 x double> %v49, <8 x double> %v54)
  %v57 = fmul <8 x double> splat (double 0x3FEF49F49F49F49F), %v18
  %v58 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC00DDDDDDDDDDDDE), <8 x double> %v38, <8 x double> %v57)
  %v59 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C71C71C71C71C), <8 x double> %v53, <8 x double> %v58)
  %v60 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v59, <8 x double> %v21)
  %v61 = fmul <8 x double> splat (double 0x3FEF49F49F49F49F), %v24
  %v62 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC00DDDDDDDDDDDDE), <8 x double> %v43, <8 x double> %v61)
  %v63 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C71C71C71C71C), <8 x double> %v56, <8 x double> %v62)
  %v64 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v63, <8 x double> %v27)
  %v65 = fmul <8 x double> %v30, %v60
  %v66 = fmul <8 x double> %v32, %v60
  %v67 = fneg <8 x double> %v66
  %v68 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v67, <8 x double> %v64, <8 x double> %v65)
  %v69 = fmul <8 x double> %v40, %v64
  %v70 = fmul <8 x double> %v34, %v60
  %v71 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v70, <8 x double> %v64, <8 x double> %v69)
  %v72 = fmul <8 x double> splat (double 0x40079EEC0FC37181), %v18
  %v73 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC027310BD29520E4), <8 x double> %v38, <8 x double> %v72)
  %v74 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4023A552363C5290), <8 x double> %v53, <8 x double> %v73)
  %v75 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD29C9EBA1E3345), <8 x double> %v68, <8 x double> %v74)
  %v76 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v75, <8 x double> %v21)
  %v77 = fmul <8 x double> splat (double 0x40079EEC0FC37181), %v24
  %v78 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC027310BD29520E4), <8 x double> %v43, <8 x double> %v77)
  %v79 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4023A552363C5290), <8 x double> %v56, <8 x double> %v78)
  %v80 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD29C9EBA1E3345), <8 x double> %v71, <8 x double> %v79)
  %v81 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v80, <8 x double> %v27)
  %v82 = fmul <8 x double> %v30, %v76
  %v83 = fmul <8 x double> %v32, %v76
  %v84 = fneg <8 x double> %v83
  %v85 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v84, <8 x double> %v81, <8 x double> %v82)
  %v86 = fmul <8 x double> %v40, %v81
  %v87 = fmul <8 x double> %v34, %v76
  %v88 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v87, <8 x double> %v81, <8 x double> %v86)
  %v89 = fmul <8 x double> splat (double 0x4006C52BF5A814B0), %v18
  %v90 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC02583E0F83E0F84), <8 x double> %v38, <8 x double> %v89)
  %v91 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4021D016A3721E8B), <8 x double> %v53, <8 x double> %v90)
  %v92 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD1D1745D1745D1), <8 x double> %v68, <8 x double> %v91)
  %v93 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD1818970D9CC2F), <8 x double> %v85, <8 x double> %v92)
  %v94 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v93, <8 x double> %v21)
  %v95 = fmul <8 x double> splat (double 0x4006C52BF5A814B0), %v24
  %v96 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC02583E0F83E0F84), <8 x double> %v43, <8 x double> %v95)
  %v97 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4021D016A3721E8B), <8 x double> %v56, <8 x double> %v96)
  %v98 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD1D1745D1745D1), <8 x double> %v71, <8 x double> %v97)
  %v99 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD1818970D9CC2F), <8 x double> %v88, <8 x double> %v98)
  %v100 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v99, <8 x double> %v27)
  %v101 = fmul <8 x double> %v30, %v94
  %v102 = fmul <8 x double> %v32, %v94
  %v103 = fneg <8 x double> %v102
  %v104 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v103, <8 x double> %v100, <8 x double> %v101)
  %v105 = fmul <8 x double> %v40, %v100
  %v106 = fmul <8 x double> %v34, %v94
  %v107 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v106, <8 x double> %v100, <8 x double> %v105)
  %v108 = fmul <8 x double> splat (double 0x3FB7555555555555), %v18
  %v109 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FDCC0499A5605FB), <8 x double> %v53, <8 x double> %v108)
  %v110 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE4D55555555555), <8 x double> %v68, <8 x double> %v109)
  %v111 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD4A1CFB2B78C13), <8 x double> %v85, <8 x double> %v110)
  %v112 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC0C30C30C30C31), <8 x double> %v104, <8 x double> %v111)
  %v113 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v112, <8 x double> %v21)
  %v114 = fmul <8 x double> splat (double 0x3FB7555555555555), %v24
  %v115 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FDCC0499A5605FB), <8 x double> %v56, <8 x double> %v114)
  %v116 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE4D55555555555), <8 x double> %v71, <8 x double> %v115)
  %v117 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD4A1CFB2B78C13), <8 x double> %v88, <8 x double> %v116)
  %v118 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC0C30C30C30C31), <8 x double> %v107, <8 x double> %v117)
  %v119 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v118, <8 x double> %v27)
  %v120 = fmul <8 x double> %v30, %v113
  %v121 = fmul <8 x double> %v32, %v113
  %v122 = fneg <8 x double> %v121
  %v123 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v122, <8 x double> %v119, <8 x double> %v120)
  %v124 = fmul <8 x double> %v40, %v119
  %v125 = fmul <8 x double> %v34, %v113
  %v126 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v125, <8 x double> %v119, <8 x double> %v124)
  ; error in units of the tolerance, squared, averaged over the states
  %v127 = getelementptr inbounds <8 x double>, ptr %settings, i64 0
  %v128 = load <8 x double>, ptr %v127, align 64
  %v129 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v21)
  %v130 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v113)
  %v131 = fcmp ogt <8 x double> %v129, %v130
  %v132 = select <8 x i1> %v131, <8 x double> %v129, <8 x double> %v130
  %v133 = getelementptr inbounds <8 x double>, ptr %settings, i64 7
  %v134 = load <8 x double>, ptr %v133, align 64
  %v135 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v128, <8 x double> %v132, <8 x double> %v134)
  %v136 = fmul <8 x double> splat (double 0x3F54320FEDCBA987), %v18
  %v137 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF716B5A550ABFC4), <8 x double> %v53, <8 x double> %v136)
  %v138 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA2EEEEEEEEEEEF), <8 x double> %v68, <8 x double> %v137)
  %v139 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFAA0AD1D2CA1858), <8 x double> %v85, <8 x double> %v138)
  %v140 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA5748A7BDAF0E2), <8 x double> %v104, <8 x double> %v139)
  %v141 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF9999999999999A), <8 x double> %v123, <8 x double> %v140)
  %v142 = fmul <8 x double> %v14, %v141
  %v143 = fdiv <8 x double> %v142, %v135
  %v144 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v143, <8 x double> %v143, <8 x double> splat (double 0x0000000000000000))
  %v145 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v27)
  %v146 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v119)
  %v147 = fcmp ogt <8 x double> %v145, %v146
  %v148 = select <8 x i1> %v147, <8 x double> %v145, <8 x double> %v146
  %v149 = getelementptr inbounds <8 x double>, ptr %settings, i64 8
  %v150 = load <8 x double>, ptr %v149, align 64
  %v151 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v128, <8 x double> %v148, <8 x double> %v150)
  %v152 = fmul <8 x double> splat (double 0x3F54320FEDCBA987), %v24
  %v153 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF716B5A550ABFC4), <8 x double> %v56, <8 x double> %v152)
  %v154 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA2EEEEEEEEEEEF), <8 x double> %v71, <8 x double> %v153)
  %v155 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFAA0AD1D2CA1858), <8 x double> %v88, <8 x double> %v154)
  %v156 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA5748A7BDAF0E2), <8 x double> %v107, <8 x double> %v155)
  %v157 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF9999999999999A), <8 x double> %v126, <8 x double> %v156)
  %v158 = fmul <8 x double> %v14, %v157
  %v159 = fdiv <8 x double> %v158, %v151
  %v160 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v159, <8 x double> %v159, <8 x double> %v144)
  %v161 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v113, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x0000000000000000))
  %v162 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v123, <8 x double> splat (double 0x0000000000000000), <8 x double> %v161)
  %v163 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v119, <8 x double> splat (double 0x0000000000000000), <8 x double> %v162)
  %v164 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v126, <8 x double> splat (double 0x0000000000000000), <8 x double> %v163)
  %v165 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v160, <8 x double> splat (double 0x3FE0000000000000), <8 x double> %v164)
  ; accepted or refused, and the next length
  %v166 = getelementptr inbounds <8 x double>, ptr %lanes, i64 10
  %v167 = load <8 x double>, ptr %v166, align 64
  %v168 = fcmp ogt <8 x double> %v167, splat (double 0x0000000000000000)
  %v169 = fcmp ole <8 x double> %v165, splat (double 0x3FF0000000000000)
  %v170 = and <8 x i1> %v168, %v169
  %v171 = fcmp olt <8 x double> %v165, splat (double 0x46293E5939A08CEA)
  %v172 = select <8 x i1> %v171, <8 x double> %v165, <8 x double> splat (double 0x46293E5939A08CEA)
  %v173 = fcmp ogt <8 x double> %v172, splat (double 0x39B4484BFEEBC2A0)
  %v174 = select <8 x i1> %v173, <8 x double> %v172, <8 x double> splat (double 0x39B4484BFEEBC2A0)
  %v175 = bitcast <8 x double> %v174 to <8 x i64>
  %v176 = lshr <8 x i64> %v175, splat (i64 52)
  %v177 = or <8 x i64> %v176, splat (i64 4841369599423283200)
  %v178 = bitcast <8 x i64> %v177 to <8 x double>
  %v179 = fsub <8 x double> %v178, splat (double 0x43300000000003FF)
  %v180 = and <8 x i64> %v175, splat (i64 4503599627370495)
  %v181 = or <8 x i64> %v180, splat (i64 4607182418800017408)
  %v182 = bitcast <8 x i64> %v181 to <8 x double>
  %v183 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA604C059210386), <8 x double> %v182, <8 x double> splat (double 0xBFD9C2C7904CE9BE))
  %v184 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v183, <8 x double> %v182, <8 x double> splat (double 0x3FF96E7C9A8551E4))
  %v185 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v184, <8 x double> %v182, <8 x double> splat (double 0xC00BEB4578B01506))
  %v186 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v185, <8 x double> %v182, <8 x double> splat (double 0x401431010187BF7D))
  %v187 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v186, <8 x double> %v182, <8 x double> splat (double 0xC0064DAC40654ADD))
  %v188 = fadd <8 x double> %v179, %v187
  %v189 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  %v190 = load <8 x double>, ptr %v189, align 64
  %v191 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v190, <8 x double> splat (double 0x3F947AE147AE147B), <8 x double> splat (double 0xBFC374D65D9E608D))
  %v192 = select <8 x i1> %v170, <8 x double> %v191, <8 x double> splat (double 0xBFC374D65D9E608D)
  %v193 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v188, <8 x double> splat (double 0xBFB5C28F5C28F5C3), <8 x double> %v192)
  %v194 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  %v195 = load <8 x double>, ptr %v194, align 64
  %v196 = fcmp ogt <8 x double> %v195, splat (double 0x0000000000000000)
  %v197 = xor <8 x i1> %v170, splat (i1 true)
  %v198 = or <8 x i1> %v196, %v197
  %v199 = select <8 x i1> %v198, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x400A934F0979A371)
  %v200 = fcmp olt <8 x double> %v193, %v199
  %v201 = select <8 x i1> %v200, <8 x double> %v193, <8 x double> %v199
  %v202 = fcmp ogt <8 x double> %v201, splat (double 0xC002934F0979A371)
  %v203 = select <8 x i1> %v202, <8 x double> %v201, <8 x double> splat (double 0xC002934F0979A371)
  %v204 = fadd <8 x double> %v203, splat (double 0x4338000000000000)
  %v205 = fsub <8 x double> %v204, splat (double 0x4338000000000000)
  %v206 = fsub <8 x double> %v203, %v205
  %v207 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F83CBFA3EF5DF15), <8 x double> %v206, <8 x double> splat (double 0x3FACA1CEF240FA9C))
  %v208 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v207, <8 x double> %v206, <8 x double> splat (double 0x3FCEBFA4C61D8623))
  %v209 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v208, <8 x double> %v206, <8 x double> splat (double 0x3FE62E0C17657753))
  %v210 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v209, <8 x double> %v206, <8 x double> splat (double 0x3FF0000000000000))
  %v211 = bitcast <8 x double> %v204 to <8 x i64>
  %v212 = shl <8 x i64> %v211, splat (i64 52)
  %v213 = bitcast <8 x double> %v210 to <8 x i64>
  %v214 = add <8 x i64> %v213, %v212
  %v215 = bitcast <8 x i64> %v214 to <8 x double>
  %v216 = fmul <8 x double> %v14, %v215
  %v217 = fcmp oge <8 x double> %v215, splat (double 0x3FF0000000000000)
  %v218 = fcmp ogt <8 x double> %v4, %v216
  %v219 = and <8 x i1> %v217, %v218
  %v220 = and <8 x i1> %v170, %v219
  %v221 = select <8 x i1> %v220, <8 x double> %v4, <8 x double> %v216
  %v222 = fcmp ogt <8 x double> %v188, splat (double 0xC03A934F0979A371)
  %v223 = select <8 x i1> %v222, <8 x double> %v188, <8 x double> splat (double 0xC03A934F0979A371)
  ; what the lane is now
  %v224 = fcmp ogt <8 x double> %v167, splat (double 0x0000000000000000)
  %v225 = xor <8 x i1> %v170, splat (i1 true)
  %v226 = and <8 x i1> %v224, %v225
  %v227 = select <8 x i1> %v170, <8 x double> %v16, <8 x double> %v2
  %v228 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  store <8 x double> %v227, ptr %v228, align 64
  %v229 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v230 = load <8 x double>, ptr %v229, align 64
  %v231 = select <8 x i1> %v170, <8 x double> %v2, <8 x double> %v230
  %v232 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  store <8 x double> %v231, ptr %v232, align 64
  %v233 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v234 = load <8 x double>, ptr %v233, align 64
  %v235 = select <8 x i1> %v170, <8 x double> %v14, <8 x double> %v234
  %v236 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  store <8 x double> %v235, ptr %v236, align 64
  %v237 = select <8 x i1> %v170, <8 x double> %v223, <8 x double> %v190
  %v238 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  store <8 x double> %v237, ptr %v238, align 64
  %v239 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  store <8 x double> %v221, ptr %v239, align 64
  %v240 = select <8 x i1> %v226, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v241 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  store <8 x double> %v240, ptr %v241, align 64
  %v242 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  %v243 = load <8 x double>, ptr %v242, align 64
  %v244 = fmul <8 x double> %v243, splat (double 0x3FE0000000000000)
  %v245 = select <8 x i1> %v170, <8 x double> %v244, <8 x double> %v243
  %v246 = fcmp olt <8 x double> %v165, splat (double 0x7FF0000000000000)
  %v247 = select <8 x i1> %v246, <8 x double> %v245, <8 x double> splat (double 0x3FF0000000000000)
  %v248 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  store <8 x double> %v247, ptr %v248, align 64
  %v249 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  %v250 = load <8 x double>, ptr %v249, align 64
  %v251 = select <8 x i1> %v170, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v252 = fadd <8 x double> %v250, %v251
  %v253 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  %v254 = load <8 x double>, ptr %v253, align 64
  %v255 = select <8 x i1> %v226, <8 x double> splat (double 0x3FF0000000000000), <8 x double> splat (double 0x0000000000000000)
  %v256 = fadd <8 x double> %v254, %v255
  %v257 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  store <8 x double> %v252, ptr %v257, align 64
  %v258 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  store <8 x double> %v256, ptr %v258, align 64
  ; who needs attention
  %v259 = and <8 x i1> %v170, %v9
  %v260 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v2)
  %v261 = getelementptr inbounds <8 x double>, ptr %settings, i64 2
  %v262 = load <8 x double>, ptr %v261, align 64
  %v263 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3CF0000000000000), <8 x double> %v260, <8 x double> %v262)
  %v264 = fcmp olt <8 x double> %v221, %v263
  %v265 = fadd <8 x double> %v252, %v256
  %v266 = getelementptr inbounds <8 x double>, ptr %settings, i64 1
  %v267 = load <8 x double>, ptr %v266, align 64
  %v268 = fcmp oge <8 x double> %v265, %v267
  %v269 = fcmp ogt <8 x double> %v167, splat (double 0x0000000000000000)
  %v270 = xor <8 x i1> %v259, splat (i1 true)
  %v271 = and <8 x i1> %v269, %v270
  %v272 = or <8 x i1> %v264, %v268
  %v273 = and <8 x i1> %v271, %v272
  %v274 = getelementptr inbounds <8 x double>, ptr %settings, i64 9
  %v275 = load <8 x double>, ptr %v274, align 64
  %v276 = fcmp olt <8 x double> %v113, %v275
  %v277 = or <8 x i1> zeroinitializer, %v276
  %v278 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v279 = load <8 x double>, ptr %v278, align 64
  %v280 = fcmp ogt <8 x double> %v113, %v279
  %v281 = or <8 x i1> %v277, %v280
  %v282 = getelementptr inbounds <8 x double>, ptr %settings, i64 10
  %v283 = load <8 x double>, ptr %v282, align 64
  %v284 = fcmp olt <8 x double> %v119, %v283
  %v285 = or <8 x i1> %v281, %v284
  %v286 = getelementptr inbounds <8 x double>, ptr %settings, i64 12
  %v287 = load <8 x double>, ptr %v286, align 64
  %v288 = fcmp ogt <8 x double> %v119, %v287
  %v289 = or <8 x i1> %v285, %v288
  %v290 = and <8 x i1> %v170, %v289
  %v291 = or <8 x i1> %v273, %v290
  %v292 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  %v293 = load <8 x double>, ptr %v292, align 64
  %v294 = fcmp olt <8 x double> %v293, %v16
  %v295 = fcmp ole <8 x double> %v293, %v16
  %v296 = or <8 x i1> %v259, %v291
  %v297 = select <8 x i1> %v296, <8 x i1> %v294, <8 x i1> %v295
  %v298 = and <8 x i1> %v170, %v297
  %v299 = bitcast <8 x i1> %v259 to i8
  %v300 = zext i8 %v299 to i64
  %v301 = bitcast <8 x i1> %v291 to i8
  %v302 = zext i8 %v301 to i64
  %v303 = bitcast <8 x i1> %v298 to i8
  %v304 = icmp ne i8 %v303, 0
  br i1 %v304, label %curve, label %move
curve:
  %v305 = fsub <8 x double> %v113, %v21
  %v306 = fneg <8 x double> %v305
  %v307 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v18, <8 x double> %v306)
  %v308 = fneg <8 x double> %v14
  %v309 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v308, <8 x double> %v123, <8 x double> %v305)
  %v310 = fsub <8 x double> %v309, %v307
  %v311 = fmul <8 x double> splat (double 0xBFF208439215A046), %v18
  %v312 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40056744F3B9A987), <8 x double> %v53, <8 x double> %v311)
  %v313 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC016BDFAC7A2320C), <8 x double> %v68, <8 x double> %v312)
  %v314 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C2CEAE0978C92), <8 x double> %v85, <8 x double> %v313)
  %v315 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFFC46C8B61F95E5), <8 x double> %v104, <8 x double> %v314)
  %v316 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40030F4BDF0DC914), <8 x double> %v123, <8 x double> %v315)
  %v317 = fmul <8 x double> %v14, %v316
  %v318 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  store <8 x double> %v21, ptr %v318, align 64
  %v319 = getelementptr inbounds <8 x double>, ptr %lanes, i64 33
  store <8 x double> %v305, ptr %v319, align 64
  %v320 = getelementptr inbounds <8 x double>, ptr %lanes, i64 35
  store <8 x double> %v307, ptr %v320, align 64
  %v321 = getelementptr inbounds <8 x double>, ptr %lanes, i64 37
  store <8 x double> %v310, ptr %v321, align 64
  %v322 = getelementptr inbounds <8 x double>, ptr %lanes, i64 39
  store <8 x double> %v317, ptr %v322, align 64
  %v323 = fsub <8 x double> %v119, %v27
  %v324 = fneg <8 x double> %v323
  %v325 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v14, <8 x double> %v24, <8 x double> %v324)
  %v326 = fneg <8 x double> %v14
  %v327 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v326, <8 x double> %v126, <8 x double> %v323)
  %v328 = fsub <8 x double> %v327, %v325
  %v329 = fmul <8 x double> splat (double 0xBFF208439215A046), %v24
  %v330 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40056744F3B9A987), <8 x double> %v56, <8 x double> %v329)
  %v331 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC016BDFAC7A2320C), <8 x double> %v71, <8 x double> %v330)
  %v332 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C2CEAE0978C92), <8 x double> %v88, <8 x double> %v331)
  %v333 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFFC46C8B61F95E5), <8 x double> %v107, <8 x double> %v332)
  %v334 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40030F4BDF0DC914), <8 x double> %v126, <8 x double> %v333)
  %v335 = fmul <8 x double> %v14, %v334
  %v336 = getelementptr inbounds <8 x double>, ptr %lanes, i64 32
  store <8 x double> %v27, ptr %v336, align 64
  %v337 = getelementptr inbounds <8 x double>, ptr %lanes, i64 34
  store <8 x double> %v323, ptr %v337, align 64
  %v338 = getelementptr inbounds <8 x double>, ptr %lanes, i64 36
  store <8 x double> %v325, ptr %v338, align 64
  %v339 = getelementptr inbounds <8 x double>, ptr %lanes, i64 38
  store <8 x double> %v328, ptr %v339, align 64
  %v340 = getelementptr inbounds <8 x double>, ptr %lanes, i64 40
  store <8 x double> %v335, ptr %v340, align 64
  br label %move
move:
  %v341 = select <8 x i1> %v170, <8 x double> %v113, <8 x double> %v21
  %v342 = select <8 x i1> %v170, <8 x double> %v123, <8 x double> %v18
  %v343 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  store <8 x double> %v341, ptr %v343, align 64
  %v344 = getelementptr inbounds <8 x double>, ptr %lanes, i64 27
  store <8 x double> %v342, ptr %v344, align 64
  %v345 = getelementptr inbounds <8 x double>, ptr %lanes, i64 29
  %v346 = load <8 x double>, ptr %v345, align 64
  %v347 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v341)
  %v348 = fcmp ogt <8 x double> %v346, %v347
  %v349 = select <8 x i1> %v348, <8 x double> %v346, <8 x double> %v347
  %v350 = getelementptr inbounds <8 x double>, ptr %lanes, i64 29
  store <8 x double> %v349, ptr %v350, align 64
  %v351 = select <8 x i1> %v170, <8 x double> %v119, <8 x double> %v27
  %v352 = select <8 x i1> %v170, <8 x double> %v126, <8 x double> %v24
  %v353 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  store <8 x double> %v351, ptr %v353, align 64
  %v354 = getelementptr inbounds <8 x double>, ptr %lanes, i64 28
  store <8 x double> %v352, ptr %v354, align 64
  %v355 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  %v356 = load <8 x double>, ptr %v355, align 64
  %v357 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v351)
  %v358 = fcmp ogt <8 x double> %v356, %v357
  %v359 = select <8 x i1> %v358, <8 x double> %v356, <8 x double> %v357
  %v360 = getelementptr inbounds <8 x double>, ptr %lanes, i64 30
  store <8 x double> %v359, ptr %v360, align 64
  br i1 %v304, label %observe, label %judge
observe:
  %v361 = or i64 %v300, %v302
  %v362 = bitcast <8 x i1> %v298 to i8
  %v363 = zext i8 %v362 to i64
  call void @uq_observe(ptr %lanes, ptr %settings, i64 %v363, i64 %v361)
  br label %judge
judge:
  %v364 = bitcast <8 x i1> %v291 to i8
  %v365 = icmp ne i8 %v364, 0
  br i1 %v365, label %failure, label %done
failure:
  %v366 = fcmp ogt <8 x double> %v247, splat (double 0x3F50000000000000)
  %v367 = select <8 x i1> %v366, <8 x double> splat (double 0x4008000000000000), <8 x double> splat (double 0x401C000000000000)
  %v368 = fmul <8 x double> %v263, splat (double 0x40C3880000000000)
  %v369 = getelementptr inbounds <8 x double>, ptr %settings, i64 3
  %v370 = load <8 x double>, ptr %v369, align 64
  %v371 = fmul <8 x double> %v341, %v342
  %v372 = fcmp ogt <8 x double> %v371, splat (double 0x0000000000000000)
  %v373 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v341)
  %v374 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v342)
  %v375 = fmul <8 x double> %v368, %v374
  %v376 = fcmp ole <8 x double> %v373, %v375
  %v377 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v341)
  %v378 = fcmp ogt <8 x double> %v377, splat (double 0x5F138D352E5096AF)
  %v379 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v341)
  %v380 = fmul <8 x double> %v128, %v379
  %v381 = fmul <8 x double> %v134, splat (double 0x412E848000000000)
  %v382 = fcmp ogt <8 x double> %v380, %v381
  %v383 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v341)
  %v384 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v342)
  %v385 = fmul <8 x double> %v370, %v384
  %v386 = fcmp ole <8 x double> %v383, %v385
  %v387 = and <8 x i1> %v382, %v386
  %v388 = or <8 x i1> %v376, %v378
  %v389 = or <8 x i1> %v388, %v387
  %v390 = and <8 x i1> %v372, %v389
  %v391 = or <8 x i1> zeroinitializer, %v390
  %v392 = fmul <8 x double> %v351, %v352
  %v393 = fcmp ogt <8 x double> %v392, splat (double 0x0000000000000000)
  %v394 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v351)
  %v395 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v352)
  %v396 = fmul <8 x double> %v368, %v395
  %v397 = fcmp ole <8 x double> %v394, %v396
  %v398 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v351)
  %v399 = fcmp ogt <8 x double> %v398, splat (double 0x5F138D352E5096AF)
  %v400 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v351)
  %v401 = fmul <8 x double> %v128, %v400
  %v402 = fmul <8 x double> %v150, splat (double 0x412E848000000000)
  %v403 = fcmp ogt <8 x double> %v401, %v402
  %v404 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v351)
  %v405 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v352)
  %v406 = fmul <8 x double> %v370, %v405
  %v407 = fcmp ole <8 x double> %v404, %v406
  %v408 = and <8 x i1> %v403, %v407
  %v409 = or <8 x i1> %v397, %v399
  %v410 = or <8 x i1> %v409, %v408
  %v411 = and <8 x i1> %v393, %v410
  %v412 = or <8 x i1> %v391, %v411
  %v413 = select <8 x i1> %v412, <8 x double> splat (double 0x4010000000000000), <8 x double> %v367
  %v414 = select <8 x i1> %v264, <8 x double> %v413, <8 x double> splat (double 0x4014000000000000)
  %v415 = select <8 x i1> %v290, <8 x double> splat (double 0x4000000000000000), <8 x double> %v414
  %v416 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v415, ptr %v416, align 64
  br label %done
done:
  %v417 = shl i64 %v302, 8
  %v418 = or i64 %v300, %v417
  ret i64 %v418
}

define void @uq_observe(ptr noalias %lanes, ptr noalias readonly %settings, i64 %due, i64 %strict) #0 {
entry:
  %v1 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = trunc i64 %due to i8
  %v4 = bitcast i8 %v3 to <8 x i1>
  %v5 = trunc i64 %strict to i8
  %v6 = bitcast i8 %v5 to <8 x i1>
  %v7 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  %v8 = load <8 x double>, ptr %v7, align 64
  %v9 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 15
  %v10 = load <8 x i64>, ptr %v9, align 64
  %v11 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 16
  %v12 = load <8 x i64>, ptr %v11, align 64
  %v13 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 17
  %v14 = load <8 x i64>, ptr %v13, align 64
  br label %next
next:
  %due.now = phi <8 x i1> [ %v4, %entry ], [ %due.then, %next ]
  %at.now = phi <8 x double> [ %v8, %entry ], [ %at.then, %next ]
  %clock.now = phi <8 x i64> [ %v10, %entry ], [ %clock.then, %next ]
  %place.now = phi <8 x i64> [ %v12, %entry ], [ %place.then, %next ]
  %truth_place.now = phi <8 x i64> [ %v14, %entry ], [ %truth_place.then, %next ]
  %v15 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v16 = load <8 x double>, ptr %v15, align 64
  %v17 = fsub <8 x double> %at.now, %v16
  %v18 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v19 = load <8 x double>, ptr %v18, align 64
  %v20 = fdiv <8 x double> %v17, %v19
  %v21 = fsub <8 x double> splat (double 0x3FF0000000000000), %v20
  %v22 = fcmp oge <8 x double> %at.now, %v2
  %v23 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  %v24 = load <8 x double>, ptr %v23, align 64
  %v25 = getelementptr inbounds <8 x double>, ptr %lanes, i64 33
  %v26 = load <8 x double>, ptr %v25, align 64
  %v27 = getelementptr inbounds <8 x double>, ptr %lanes, i64 35
  %v28 = load <8 x double>, ptr %v27, align 64
  %v29 = getelementptr inbounds <8 x double>, ptr %lanes, i64 37
  %v30 = load <8 x double>, ptr %v29, align 64
  %v31 = getelementptr inbounds <8 x double>, ptr %lanes, i64 39
  %v32 = load <8 x double>, ptr %v31, align 64
  %v33 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v21, <8 x double> %v32, <8 x double> %v30)
  %v34 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v20, <8 x double> %v33, <8 x double> %v28)
  %v35 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  %v36 = load <8 x double>, ptr %v35, align 64
  %v37 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v21, <8 x double> %v34, <8 x double> %v26)
  %v38 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v20, <8 x double> %v37, <8 x double> %v24)
  %v39 = select <8 x i1> %v22, <8 x double> %v36, <8 x double> %v38
  %v40 = getelementptr inbounds <8 x double>, ptr %lanes, i64 32
  %v41 = load <8 x double>, ptr %v40, align 64
  %v42 = getelementptr inbounds <8 x double>, ptr %lanes, i64 34
  %v43 = load <8 x double>, ptr %v42, align 64
  %v44 = getelementptr inbounds <8 x double>, ptr %lanes, i64 36
  %v45 = load <8 x double>, ptr %v44, align 64
  %v46 = getelementptr inbounds <8 x double>, ptr %lanes, i64 38
  %v47 = load <8 x double>, ptr %v46, align 64
  %v48 = getelementptr inbounds <8 x double>, ptr %lanes, i64 40
  %v49 = load <8 x double>, ptr %v48, align 64
  %v50 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v21, <8 x double> %v49, <8 x double> %v47)
  %v51 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v20, <8 x double> %v50, <8 x double> %v45)
  %v52 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  %v53 = load <8 x double>, ptr %v52, align 64
  %v54 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v21, <8 x double> %v51, <8 x double> %v43)
  %v55 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v20, <8 x double> %v54, <8 x double> %v41)
  %v56 = select <8 x i1> %v22, <8 x double> %v53, <8 x double> %v55
  %v57 = getelementptr inbounds <8 x i64>, ptr %settings, i64 6
  %v58 = load <8 x i64>, ptr %v57, align 64
  %v59 = getelementptr inbounds <8 x i64>, ptr %settings, i64 5
  %v60 = load <8 x i64>, ptr %v59, align 64
  %v61 = getelementptr inbounds <8 x i64>, ptr %settings, i64 4
  %v62 = load <8 x i64>, ptr %v61, align 64
  %v63 = select <8 x i1> %due.now, <8 x i64> %place.now, <8 x i64> %v58
  %v64 = extractelement <8 x i64> %v63, i64 0
  %v65 = extractelement <8 x i64> %v63, i64 1
  %v66 = extractelement <8 x i64> %v63, i64 2
  %v67 = extractelement <8 x i64> %v63, i64 3
  %v68 = extractelement <8 x i64> %v63, i64 4
  %v69 = extractelement <8 x i64> %v63, i64 5
  %v70 = extractelement <8 x i64> %v63, i64 6
  %v71 = extractelement <8 x i64> %v63, i64 7
  %v72 = inttoptr i64 %v64 to ptr
  %v73 = inttoptr i64 %v65 to ptr
  %v74 = inttoptr i64 %v66 to ptr
  %v75 = inttoptr i64 %v67 to ptr
  %v76 = inttoptr i64 %v68 to ptr
  %v77 = inttoptr i64 %v69 to ptr
  %v78 = inttoptr i64 %v70 to ptr
  %v79 = inttoptr i64 %v71 to ptr
  %v80 = extractelement <8 x double> %v39, i64 0
  store double %v80, ptr %v72, align 8
  %v81 = extractelement <8 x double> %v39, i64 1
  store double %v81, ptr %v73, align 8
  %v82 = extractelement <8 x double> %v39, i64 2
  store double %v82, ptr %v74, align 8
  %v83 = extractelement <8 x double> %v39, i64 3
  store double %v83, ptr %v75, align 8
  %v84 = extractelement <8 x double> %v39, i64 4
  store double %v84, ptr %v76, align 8
  %v85 = extractelement <8 x double> %v39, i64 5
  store double %v85, ptr %v77, align 8
  %v86 = extractelement <8 x double> %v39, i64 6
  store double %v86, ptr %v78, align 8
  %v87 = extractelement <8 x double> %v39, i64 7
  store double %v87, ptr %v79, align 8
  %v88 = add <8 x i64> %place.now, %v62
  %v89 = select <8 x i1> %due.now, <8 x i64> %v88, <8 x i64> %v58
  %v90 = extractelement <8 x i64> %v89, i64 0
  %v91 = extractelement <8 x i64> %v89, i64 1
  %v92 = extractelement <8 x i64> %v89, i64 2
  %v93 = extractelement <8 x i64> %v89, i64 3
  %v94 = extractelement <8 x i64> %v89, i64 4
  %v95 = extractelement <8 x i64> %v89, i64 5
  %v96 = extractelement <8 x i64> %v89, i64 6
  %v97 = extractelement <8 x i64> %v89, i64 7
  %v98 = inttoptr i64 %v90 to ptr
  %v99 = inttoptr i64 %v91 to ptr
  %v100 = inttoptr i64 %v92 to ptr
  %v101 = inttoptr i64 %v93 to ptr
  %v102 = inttoptr i64 %v94 to ptr
  %v103 = inttoptr i64 %v95 to ptr
  %v104 = inttoptr i64 %v96 to ptr
  %v105 = inttoptr i64 %v97 to ptr
  %v106 = extractelement <8 x double> %v56, i64 0
  store double %v106, ptr %v98, align 8
  %v107 = extractelement <8 x double> %v56, i64 1
  store double %v107, ptr %v99, align 8
  %v108 = extractelement <8 x double> %v56, i64 2
  store double %v108, ptr %v100, align 8
  %v109 = extractelement <8 x double> %v56, i64 3
  store double %v109, ptr %v101, align 8
  %v110 = extractelement <8 x double> %v56, i64 4
  store double %v110, ptr %v102, align 8
  %v111 = extractelement <8 x double> %v56, i64 5
  store double %v111, ptr %v103, align 8
  %v112 = extractelement <8 x double> %v56, i64 6
  store double %v112, ptr %v104, align 8
  %v113 = extractelement <8 x double> %v56, i64 7
  store double %v113, ptr %v105, align 8
  %v114 = add <8 x i64> %v88, %v62
  %v115 = select <8 x i1> %due.now, <8 x i64> splat (i64 8), <8 x i64> zeroinitializer
  %clock.then = add <8 x i64> %clock.now, %v115
  %place.then = add <8 x i64> %place.now, %v115
  %v116 = select <8 x i1> %due.now, <8 x i64> splat (i64 1), <8 x i64> zeroinitializer
  %truth_place.then = add <8 x i64> %truth_place.now, %v116
  %v117 = extractelement <8 x i64> %clock.then, i64 0
  %v118 = extractelement <8 x i64> %clock.then, i64 1
  %v119 = extractelement <8 x i64> %clock.then, i64 2
  %v120 = extractelement <8 x i64> %clock.then, i64 3
  %v121 = extractelement <8 x i64> %clock.then, i64 4
  %v122 = extractelement <8 x i64> %clock.then, i64 5
  %v123 = extractelement <8 x i64> %clock.then, i64 6
  %v124 = extractelement <8 x i64> %clock.then, i64 7
  %v125 = inttoptr i64 %v117 to ptr
  %v126 = inttoptr i64 %v118 to ptr
  %v127 = inttoptr i64 %v119 to ptr
  %v128 = inttoptr i64 %v120 to ptr
  %v129 = inttoptr i64 %v121 to ptr
  %v130 = inttoptr i64 %v122 to ptr
  %v131 = inttoptr i64 %v123 to ptr
  %v132 = inttoptr i64 %v124 to ptr
  %v133 = load double, ptr %v125, align 8
  %v134 = insertelement <8 x double> poison, double %v133, i64 0
  %v135 = load double, ptr %v126, align 8
  %v136 = insertelement <8 x double> %v134, double %v135, i64 1
  %v137 = load double, ptr %v127, align 8
  %v138 = insertelement <8 x double> %v136, double %v137, i64 2
  %v139 = load double, ptr %v128, align 8
  %v140 = insertelement <8 x double> %v138, double %v139, i64 3
  %v141 = load double, ptr %v129, align 8
  %v142 = insertelement <8 x double> %v140, double %v141, i64 4
  %v143 = load double, ptr %v130, align 8
  %v144 = insertelement <8 x double> %v142, double %v143, i64 5
  %v145 = load double, ptr %v131, align 8
  %v146 = insertelement <8 x double> %v144, double %v145, i64 6
  %v147 = load double, ptr %v132, align 8
  %v148 = insertelement <8 x double> %v146, double %v147, i64 7
  %at.then = select <8 x i1> %due.now, <8 x double> %v148, <8 x double> %at.now
  %v149 = fcmp olt <8 x double> %at.then, %v2
  %v150 = fcmp ole <8 x double> %at.then, %v2
  %v151 = select <8 x i1> %v6, <8 x i1> %v149, <8 x i1> %v150
  %due.then = and <8 x i1> %due.now, %v151
  %v152 = bitcast <8 x i1> %due.then to i8
  %v153 = icmp ne i8 %v152, 0
  br i1 %v153, label %next, label %done
done:
  %v154 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  store <8 x double> %at.then, ptr %v154, align 64
  %v155 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 15
  store <8 x i64> %clock.then, ptr %v155, align 64
  %v156 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 16
  store <8 x i64> %place.then, ptr %v156, align 64
  %v157 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 17
  store <8 x i64> %truth_place.then, ptr %v157, align 64
  ret void
}

define void @uq_outcomes(ptr noalias readonly %given, ptr noalias %taken, i64 %groups) #0 {
entry:
  %some = icmp sgt i64 %groups, 0
  br i1 %some, label %group, label %done
group:
  %g = phi i64 [ 0, %entry ], [ %next, %group ]
  %in = mul i64 %g, 6
  %out = mul i64 %g, 0
  %from = getelementptr inbounds <8 x double>, ptr %given, i64 %in
  %to = getelementptr inbounds <8 x double>, ptr %taken, i64 %out

  %next = add i64 %g, 1
  %more = icmp slt i64 %next, %groups
  br i1 %more, label %group, label %done
done:
  ret void
}

define void @uq_starts(ptr noalias readonly %given, ptr noalias %taken, i64 %groups) #0 {
entry:
  %some = icmp sgt i64 %groups, 0
  br i1 %some, label %group, label %done
group:
  %g = phi i64 [ 0, %entry ], [ %next, %group ]
  %in = mul i64 %g, 6
  %out = mul i64 %g, 2
  %from = getelementptr inbounds <8 x double>, ptr %given, i64 %in
  %to = getelementptr inbounds <8 x double>, ptr %taken, i64 %out
  %v1 = getelementptr inbounds <8 x double>, ptr %from, i64 4
  %v2 = load <8 x double>, ptr %v1, align 64
  %v3 = getelementptr inbounds <8 x double>, ptr %from, i64 5
  %v4 = load <8 x double>, ptr %v3, align 64
  %v5 = getelementptr inbounds <8 x double>, ptr %to, i64 0
  store <8 x double> %v2, ptr %v5, align 64
  %v6 = getelementptr inbounds <8 x double>, ptr %to, i64 1
  store <8 x double> %v4, ptr %v6, align 64
  %next = add i64 %g, 1
  %more = icmp slt i64 %next, %groups
  br i1 %more, label %group, label %done
done:
  ret void
}

declare <8 x double> @llvm.fabs.v8f64(<8 x double>)
declare <8 x double> @llvm.fma.v8f64(<8 x double>, <8 x double>, <8 x double>)
declare <8 x double> @llvm.sqrt.v8f64(<8 x double>)

attributes #0 = { nounwind }

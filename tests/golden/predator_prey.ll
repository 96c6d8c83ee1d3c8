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
  %v38 = getelementptr inbounds <8 x double>, ptr %settings, i64 9
  %v39 = load <8 x double>, ptr %v38, align 64
  %v40 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v37, <8 x double> %v39)
  %v41 = fdiv <8 x double> %v4, %v40
  %v42 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v41, <8 x double> %v41, <8 x double> splat (double 0x0000000000000000))
  %v43 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v6)
  %v44 = getelementptr inbounds <8 x double>, ptr %settings, i64 10
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
  %v62 = fmul <8 x double> %v60, %v34
  %v63 = fcmp olt <8 x double> %v62, splat (double 0x3EE4F8B588E368F1)
  %v64 = or <8 x i1> %v61, %v63
  %v65 = fmul <8 x double> %v34, splat (double 0x3EB0C6F7A0B5ED8D)
  %v66 = fmul <8 x double> splat (double 0x3F847AE147AE147B), %v50
  %v67 = fdiv <8 x double> %v66, %v60
  %v68 = select <8 x i1> %v64, <8 x double> %v65, <8 x double> %v67
  %v69 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v16)
  %v70 = getelementptr inbounds <8 x double>, ptr %settings, i64 2
  %v71 = load <8 x double>, ptr %v70, align 64
  %v72 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3CF0000000000000), <8 x double> %v69, <8 x double> %v71)
  %v73 = fcmp ogt <8 x double> %v68, %v72
  %v74 = select <8 x i1> %v73, <8 x double> %v68, <8 x double> %v72
  %v75 = fcmp olt <8 x double> %v74, %v34
  %v76 = select <8 x i1> %v75, <8 x double> %v74, <8 x double> %v34
  %v77 = fdiv <8 x double> %v50, %v60
  %v78 = fcmp olt <8 x double> %v77, %v34
  %v79 = select <8 x i1> %v78, <8 x double> %v77, <8 x double> %v34
  %v80 = select <8 x i1> %v64, <8 x double> %v34, <8 x double> %v79
  %v81 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v76, <8 x double> %v26, <8 x double> %v4)
  %v82 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v76, <8 x double> %v29, <8 x double> %v6)
  %v83 = fmul <8 x double> %v18, %v81
  %v84 = fmul <8 x double> %v20, %v81
  %v85 = fneg <8 x double> %v84
  %v86 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v85, <8 x double> %v82, <8 x double> %v83)
  %v87 = fmul <8 x double> %v7, %v82
  %v88 = fmul <8 x double> %v22, %v81
  %v89 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v88, <8 x double> %v82, <8 x double> %v87)
  %v90 = fsub <8 x double> %v86, %v26
  %v91 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v4)
  %v92 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v91, <8 x double> %v39)
  %v93 = fdiv <8 x double> %v90, %v92
  %v94 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v93, <8 x double> %v93, <8 x double> splat (double 0x0000000000000000))
  %v95 = fsub <8 x double> %v89, %v29
  %v96 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v6)
  %v97 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v36, <8 x double> %v96, <8 x double> %v45)
  %v98 = fdiv <8 x double> %v95, %v97
  %v99 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v98, <8 x double> %v98, <8 x double> %v94)
  %v100 = fmul <8 x double> %v99, splat (double 0x3FE0000000000000)
  %v101 = call <8 x double> @llvm.sqrt.v8f64(<8 x double> %v100)
  %v102 = fdiv <8 x double> %v101, %v76
  %v103 = fmul <8 x double> %v60, %v80
  %v104 = fmul <8 x double> %v102, %v80
  %v105 = fmul <8 x double> %v104, %v80
  %v106 = fcmp ogt <8 x double> %v103, %v105
  %v107 = select <8 x i1> %v106, <8 x double> %v103, <8 x double> %v105
  %v108 = fcmp olt <8 x double> %v107, splat (double 0x73D658E3AB795204)
  %v109 = select <8 x i1> %v108, <8 x double> %v107, <8 x double> splat (double 0x73D658E3AB795204)
  %v110 = fcmp ogt <8 x double> %v109, splat (double 0x0C06E93F5DA2824C)
  %v111 = select <8 x i1> %v110, <8 x double> %v109, <8 x double> splat (double 0x0C06E93F5DA2824C)
  %v112 = bitcast <8 x double> %v111 to <8 x i64>
  %v113 = lshr <8 x i64> %v112, splat (i64 52)
  %v114 = or <8 x i64> %v113, splat (i64 4841369599423283200)
  %v115 = bitcast <8 x i64> %v114 to <8 x double>
  %v116 = fsub <8 x double> %v115, splat (double 0x43300000000003FF)
  %v117 = and <8 x i64> %v112, splat (i64 4503599627370495)
  %v118 = or <8 x i64> %v117, splat (i64 4607182418800017408)
  %v119 = bitcast <8 x i64> %v118 to <8 x double>
  %v120 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA604C059210386), <8 x double> %v119, <8 x double> splat (double 0xBFD9C2C7904CE9BE))
  %v121 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v120, <8 x double> %v119, <8 x double> splat (double 0x3FF96E7C9A8551E4))
  %v122 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v121, <8 x double> %v119, <8 x double> splat (double 0xC00BEB4578B01506))
  %v123 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v122, <8 x double> %v119, <8 x double> splat (double 0x401431010187BF7D))
  %v124 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v123, <8 x double> %v119, <8 x double> splat (double 0xC0064DAC40654ADD))
  %v125 = fadd <8 x double> %v116, %v124
  %v126 = fmul <8 x double> %v125, splat (double 0xBFC999999999999A)
  %v127 = fadd <8 x double> %v126, splat (double 0xBFF542A5A12E1C5A)
  %v128 = fadd <8 x double> %v127, splat (double 0x4338000000000000)
  %v129 = fsub <8 x double> %v128, splat (double 0x4338000000000000)
  %v130 = fsub <8 x double> %v127, %v129
  %v131 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3F83CBFA3EF5DF15), <8 x double> %v130, <8 x double> splat (double 0x3FACA1CEF240FA9C))
  %v132 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v131, <8 x double> %v130, <8 x double> splat (double 0x3FCEBFA4C61D8623))
  %v133 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v132, <8 x double> %v130, <8 x double> splat (double 0x3FE62E0C17657753))
  %v134 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v133, <8 x double> %v130, <8 x double> splat (double 0x3FF0000000000000))
  %v135 = bitcast <8 x double> %v128 to <8 x i64>
  %v136 = shl <8 x i64> %v135, splat (i64 52)
  %v137 = bitcast <8 x double> %v134 to <8 x i64>
  %v138 = add <8 x i64> %v137, %v136
  %v139 = bitcast <8 x i64> %v138 to <8 x double>
  %v140 = fmul <8 x double> %v80, %v139
  %v141 = fmul <8 x double> %v34, splat (double 0x3EB0C6F7A0B5ED8D)
  %v142 = fmul <8 x double> %v76, splat (double 0x3F50624DD2F1A9FC)
  %v143 = fcmp ogt <8 x double> %v141, %v142
  %v144 = select <8 x i1> %v143, <8 x double> %v141, <8 x double> %v142
  %v145 = fcmp ole <8 x double> %v107, splat (double 0x3CD203AF9EE75616)
  %v146 = select <8 x i1> %v145, <8 x double> %v144, <8 x double> %v140
  %v147 = fmul <8 x double> splat (double 0x4059000000000000), %v76
  %v148 = fcmp olt <8 x double> %v147, %v146
  %v149 = select <8 x i1> %v148, <8 x double> %v147, <8 x double> %v146
  %v150 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v16)
  %v151 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3CF0000000000000), <8 x double> %v150, <8 x double> %v71)
  %v152 = fcmp ogt <8 x double> %v149, %v151
  %v153 = select <8 x i1> %v152, <8 x double> %v149, <8 x double> %v151
  %v154 = fcmp olt <8 x double> %v153, %v34
  %v155 = select <8 x i1> %v154, <8 x double> %v153, <8 x double> %v34
  %v156 = fcmp ord <8 x double> %v102, %v102
  %v157 = select <8 x i1> %v156, <8 x double> %v155, <8 x double> %v76
  %v158 = getelementptr inbounds <8 x double>, ptr %lanes, i64 1
  store <8 x double> %v157, ptr %v158, align 64
  %v159 = getelementptr inbounds <8 x double>, ptr %lanes, i64 6
  store <8 x double> splat (double 0xC03A934F0979A371), ptr %v159, align 64
  %v160 = getelementptr inbounds <8 x double>, ptr %lanes, i64 7
  store <8 x double> splat (double 0x0000000000000000), ptr %v160, align 64
  %v161 = getelementptr inbounds <8 x double>, ptr %lanes, i64 8
  store <8 x double> splat (double 0x0000000000000000), ptr %v161, align 64
  %v162 = getelementptr inbounds <8 x double>, ptr %lanes, i64 9
  store <8 x double> splat (double 0x0000000000000000), ptr %v162, align 64
  %v163 = getelementptr inbounds <8 x double>, ptr %lanes, i64 13
  store <8 x double> splat (double 0x0000000000000000), ptr %v163, align 64
  %v164 = getelementptr inbounds <8 x double>, ptr %lanes, i64 14
  store <8 x double> splat (double 0x0000000000000000), ptr %v164, align 64
  %v165 = getelementptr inbounds <8 x double>, ptr %lanes, i64 10
  store <8 x double> splat (double 0x3FF0000000000000), ptr %v165, align 64
  %v166 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  store <8 x double> %v16, ptr %v166, align 64
  %v167 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  store <8 x double> splat (double 0x3FF0000000000000), ptr %v167, align 64
  %v168 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v169 = load <8 x double>, ptr %v168, align 64
  %v170 = fcmp olt <8 x double> %v4, %v169
  %v171 = or <8 x i1> zeroinitializer, %v170
  %v172 = getelementptr inbounds <8 x double>, ptr %settings, i64 13
  %v173 = load <8 x double>, ptr %v172, align 64
  %v174 = fcmp ogt <8 x double> %v4, %v173
  %v175 = or <8 x i1> %v171, %v174
  %v176 = getelementptr inbounds <8 x double>, ptr %settings, i64 12
  %v177 = load <8 x double>, ptr %v176, align 64
  %v178 = fcmp olt <8 x double> %v6, %v177
  %v179 = or <8 x i1> %v175, %v178
  %v180 = getelementptr inbounds <8 x double>, ptr %settings, i64 14
  %v181 = load <8 x double>, ptr %v180, align 64
  %v182 = fcmp ogt <8 x double> %v6, %v181
  %v183 = or <8 x i1> %v179, %v182
  %v184 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v4, <8 x double> splat (double 0x0000000000000000), <8 x double> splat (double 0x0000000000000000))
  %v185 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> splat (double 0x0000000000000000), <8 x double> %v184)
  %v186 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v6, <8 x double> splat (double 0x0000000000000000), <8 x double> %v185)
  %v187 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v29, <8 x double> splat (double 0x0000000000000000), <8 x double> %v186)
  %v188 = fcmp uno <8 x double> %v187, %v187
  %v189 = select <8 x i1> %v183, <8 x double> splat (double 0x4000000000000000), <8 x double> splat (double 0x0000000000000000)
  %v190 = select <8 x i1> %v188, <8 x double> splat (double 0x4008000000000000), <8 x double> %v189
  %v191 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v190, ptr %v191, align 64
  %v192 = or <8 x i1> %v183, %v188
  %v193 = bitcast <8 x i1> %v192 to i8
  %v194 = zext i8 %v193 to i64
  ret i64 %v194
}

define i64 @uq_step(ptr noalias %lanes, ptr noalias readonly %settings) #1 {
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
  %v14 = fadd <8 x double> %v2, %v13
  %v15 = select <8 x i1> %v9, <8 x double> %v6, <8 x double> %v14
  %v16 = fsub <8 x double> %v15, %v2
  ; stages
  %v17 = getelementptr inbounds <8 x double>, ptr %lanes, i64 27
  %v18 = load <8 x double>, ptr %v17, align 64
  %v19 = fmul <8 x double> splat (double 0x3FC999999999999A), %v18
  %v20 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  %v21 = load <8 x double>, ptr %v20, align 64
  %v22 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v19, <8 x double> %v21)
  %v23 = getelementptr inbounds <8 x double>, ptr %lanes, i64 28
  %v24 = load <8 x double>, ptr %v23, align 64
  %v25 = fmul <8 x double> splat (double 0x3FC999999999999A), %v24
  %v26 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  %v27 = load <8 x double>, ptr %v26, align 64
  %v28 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v25, <8 x double> %v27)
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
  %v46 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v45, <8 x double> %v21)
  %v47 = fmul <8 x double> splat (double 0x3FB3333333333333), %v24
  %v48 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FCCCCCCCCCCCCCD), <8 x double> %v43, <8 x double> %v47)
  %v49 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v48, <8 x double> %v27)
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
  %v60 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v59, <8 x double> %v21)
  %v61 = fmul <8 x double> splat (double 0x3FEF49F49F49F49F), %v24
  %v62 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC00DDDDDDDDDDDDE), <8 x double> %v43, <8 x double> %v61)
  %v63 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C71C71C71C71C), <8 x double> %v56, <8 x double> %v62)
  %v64 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v63, <8 x double> %v27)
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
  %v76 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v75, <8 x double> %v21)
  %v77 = fmul <8 x double> splat (double 0x40079EEC0FC37181), %v24
  %v78 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC027310BD29520E4), <8 x double> %v43, <8 x double> %v77)
  %v79 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4023A552363C5290), <8 x double> %v56, <8 x double> %v78)
  %v80 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD29C9EBA1E3345), <8 x double> %v71, <8 x double> %v79)
  %v81 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v80, <8 x double> %v27)
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
  %v94 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v93, <8 x double> %v21)
  %v95 = fmul <8 x double> splat (double 0x4006C52BF5A814B0), %v24
  %v96 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC02583E0F83E0F84), <8 x double> %v43, <8 x double> %v95)
  %v97 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x4021D016A3721E8B), <8 x double> %v56, <8 x double> %v96)
  %v98 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FD1D1745D1745D1), <8 x double> %v71, <8 x double> %v97)
  %v99 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD1818970D9CC2F), <8 x double> %v88, <8 x double> %v98)
  %v100 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v99, <8 x double> %v27)
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
  %v113 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v112, <8 x double> %v21)
  %v114 = fmul <8 x double> splat (double 0x3FB7555555555555), %v24
  %v115 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FDCC0499A5605FB), <8 x double> %v56, <8 x double> %v114)
  %v116 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FE4D55555555555), <8 x double> %v71, <8 x double> %v115)
  %v117 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFD4A1CFB2B78C13), <8 x double> %v88, <8 x double> %v116)
  %v118 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FC0C30C30C30C31), <8 x double> %v107, <8 x double> %v117)
  %v119 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v118, <8 x double> %v27)
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
  %v133 = getelementptr inbounds <8 x double>, ptr %settings, i64 9
  %v134 = load <8 x double>, ptr %v133, align 64
  %v135 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v128, <8 x double> %v132, <8 x double> %v134)
  %v136 = fmul <8 x double> splat (double 0x3F54320FEDCBA987), %v18
  %v137 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF716B5A550ABFC4), <8 x double> %v53, <8 x double> %v136)
  %v138 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA2EEEEEEEEEEEF), <8 x double> %v68, <8 x double> %v137)
  %v139 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFAA0AD1D2CA1858), <8 x double> %v85, <8 x double> %v138)
  %v140 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA5748A7BDAF0E2), <8 x double> %v104, <8 x double> %v139)
  %v141 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF9999999999999A), <8 x double> %v123, <8 x double> %v140)
  %v142 = fmul <8 x double> %v16, %v141
  %v143 = fdiv <8 x double> %v142, %v135
  %v144 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v143, <8 x double> %v143, <8 x double> splat (double 0x0000000000000000))
  %v145 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v27)
  %v146 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v119)
  %v147 = fcmp ogt <8 x double> %v145, %v146
  %v148 = select <8 x i1> %v147, <8 x double> %v145, <8 x double> %v146
  %v149 = getelementptr inbounds <8 x double>, ptr %settings, i64 10
  %v150 = load <8 x double>, ptr %v149, align 64
  %v151 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v128, <8 x double> %v148, <8 x double> %v150)
  %v152 = fmul <8 x double> splat (double 0x3F54320FEDCBA987), %v24
  %v153 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF716B5A550ABFC4), <8 x double> %v56, <8 x double> %v152)
  %v154 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA2EEEEEEEEEEEF), <8 x double> %v71, <8 x double> %v153)
  %v155 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFAA0AD1D2CA1858), <8 x double> %v88, <8 x double> %v154)
  %v156 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x3FA5748A7BDAF0E2), <8 x double> %v107, <8 x double> %v155)
  %v157 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBF9999999999999A), <8 x double> %v126, <8 x double> %v156)
  %v158 = fmul <8 x double> %v16, %v157
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
  %v216 = fmul <8 x double> %v16, %v215
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
  %v227 = select <8 x i1> %v170, <8 x double> %v15, <8 x double> %v2
  %v228 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  store <8 x double> %v227, ptr %v228, align 64
  %v229 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v230 = load <8 x double>, ptr %v229, align 64
  %v231 = select <8 x i1> %v170, <8 x double> %v2, <8 x double> %v230
  %v232 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  store <8 x double> %v231, ptr %v232, align 64
  %v233 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v234 = load <8 x double>, ptr %v233, align 64
  %v235 = select <8 x i1> %v170, <8 x double> %v16, <8 x double> %v234
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
  %v274 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v275 = load <8 x double>, ptr %v274, align 64
  %v276 = fcmp olt <8 x double> %v113, %v275
  %v277 = or <8 x i1> zeroinitializer, %v276
  %v278 = getelementptr inbounds <8 x double>, ptr %settings, i64 13
  %v279 = load <8 x double>, ptr %v278, align 64
  %v280 = fcmp ogt <8 x double> %v113, %v279
  %v281 = or <8 x i1> %v277, %v280
  %v282 = getelementptr inbounds <8 x double>, ptr %settings, i64 12
  %v283 = load <8 x double>, ptr %v282, align 64
  %v284 = fcmp olt <8 x double> %v119, %v283
  %v285 = or <8 x i1> %v281, %v284
  %v286 = getelementptr inbounds <8 x double>, ptr %settings, i64 14
  %v287 = load <8 x double>, ptr %v286, align 64
  %v288 = fcmp ogt <8 x double> %v119, %v287
  %v289 = or <8 x i1> %v285, %v288
  %v290 = and <8 x i1> %v170, %v289
  %v291 = or <8 x i1> %v273, %v290
  %v292 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  %v293 = load <8 x double>, ptr %v292, align 64
  %v294 = fcmp olt <8 x double> %v293, %v15
  %v295 = fcmp ole <8 x double> %v293, %v15
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
  %v307 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v18, <8 x double> %v306)
  %v308 = fneg <8 x double> %v16
  %v309 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v308, <8 x double> %v123, <8 x double> %v305)
  %v310 = fsub <8 x double> %v309, %v307
  %v311 = fmul <8 x double> splat (double 0xBFF208439215A046), %v18
  %v312 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40056744F3B9A987), <8 x double> %v53, <8 x double> %v311)
  %v313 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC016BDFAC7A2320C), <8 x double> %v68, <8 x double> %v312)
  %v314 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C2CEAE0978C92), <8 x double> %v85, <8 x double> %v313)
  %v315 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFFC46C8B61F95E5), <8 x double> %v104, <8 x double> %v314)
  %v316 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40030F4BDF0DC914), <8 x double> %v123, <8 x double> %v315)
  %v317 = fmul <8 x double> %v16, %v316
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
  %v325 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v16, <8 x double> %v24, <8 x double> %v324)
  %v326 = fneg <8 x double> %v16
  %v327 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v326, <8 x double> %v126, <8 x double> %v323)
  %v328 = fsub <8 x double> %v327, %v325
  %v329 = fmul <8 x double> splat (double 0xBFF208439215A046), %v24
  %v330 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40056744F3B9A987), <8 x double> %v56, <8 x double> %v329)
  %v331 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xC016BDFAC7A2320C), <8 x double> %v71, <8 x double> %v330)
  %v332 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x400C2CEAE0978C92), <8 x double> %v88, <8 x double> %v331)
  %v333 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0xBFFC46C8B61F95E5), <8 x double> %v107, <8 x double> %v332)
  %v334 = call <8 x double> @llvm.fma.v8f64(<8 x double> splat (double 0x40030F4BDF0DC914), <8 x double> %v126, <8 x double> %v333)
  %v335 = fmul <8 x double> %v16, %v334
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
  %v361 = or i64 %v300, %v302
  br i1 %v304, label %observe, label %judge
observe:
  %v362 = bitcast <8 x i1> %v298 to i8
  %v363 = zext i8 %v362 to i64
  %v364 = call i64 @uq_observe(ptr %lanes, ptr %settings, i64 %v363, i64 %v361)
  br label %judge
judge:
  %v365 = phi i64 [ 0, %move ], [ %v364, %observe ]
  %v366 = trunc i64 %v365 to i8
  %v367 = bitcast i8 %v366 to <8 x i1>
  %v368 = or <8 x i1> %v290, %v367
  %v369 = or <8 x i1> %v273, %v368
  %v370 = bitcast <8 x i1> %v369 to i8
  %v371 = zext i8 %v370 to i64
  %v372 = bitcast <8 x i1> %v369 to i8
  %v373 = icmp ne i8 %v372, 0
  br i1 %v373, label %failure, label %done
failure:
  %v374 = fcmp ogt <8 x double> %v247, splat (double 0x3F50000000000000)
  %v375 = select <8 x i1> %v374, <8 x double> splat (double 0x4008000000000000), <8 x double> splat (double 0x401C000000000000)
  %v376 = fmul <8 x double> %v263, splat (double 0x40C3880000000000)
  %v377 = getelementptr inbounds <8 x double>, ptr %settings, i64 3
  %v378 = load <8 x double>, ptr %v377, align 64
  %v379 = fmul <8 x double> %v341, %v342
  %v380 = fcmp ogt <8 x double> %v379, splat (double 0x0000000000000000)
  %v381 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v341)
  %v382 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v342)
  %v383 = fmul <8 x double> %v376, %v382
  %v384 = fcmp ole <8 x double> %v381, %v383
  %v385 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v341)
  %v386 = fcmp ogt <8 x double> %v385, splat (double 0x5F138D352E5096AF)
  %v387 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v341)
  %v388 = fmul <8 x double> %v128, %v387
  %v389 = fmul <8 x double> %v134, splat (double 0x412E848000000000)
  %v390 = fcmp ogt <8 x double> %v388, %v389
  %v391 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v341)
  %v392 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v342)
  %v393 = fmul <8 x double> %v378, %v392
  %v394 = fcmp ole <8 x double> %v391, %v393
  %v395 = and <8 x i1> %v390, %v394
  %v396 = or <8 x i1> %v384, %v386
  %v397 = or <8 x i1> %v396, %v395
  %v398 = and <8 x i1> %v380, %v397
  %v399 = or <8 x i1> zeroinitializer, %v398
  %v400 = fmul <8 x double> %v351, %v352
  %v401 = fcmp ogt <8 x double> %v400, splat (double 0x0000000000000000)
  %v402 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v351)
  %v403 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v352)
  %v404 = fmul <8 x double> %v376, %v403
  %v405 = fcmp ole <8 x double> %v402, %v404
  %v406 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v351)
  %v407 = fcmp ogt <8 x double> %v406, splat (double 0x5F138D352E5096AF)
  %v408 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v351)
  %v409 = fmul <8 x double> %v128, %v408
  %v410 = fmul <8 x double> %v150, splat (double 0x412E848000000000)
  %v411 = fcmp ogt <8 x double> %v409, %v410
  %v412 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v351)
  %v413 = call <8 x double> @llvm.fabs.v8f64(<8 x double> %v352)
  %v414 = fmul <8 x double> %v378, %v413
  %v415 = fcmp ole <8 x double> %v412, %v414
  %v416 = and <8 x i1> %v411, %v415
  %v417 = or <8 x i1> %v405, %v407
  %v418 = or <8 x i1> %v417, %v416
  %v419 = and <8 x i1> %v401, %v418
  %v420 = or <8 x i1> %v399, %v419
  %v421 = select <8 x i1> %v420, <8 x double> splat (double 0x4010000000000000), <8 x double> %v375
  %v422 = select <8 x i1> %v264, <8 x double> %v421, <8 x double> splat (double 0x4014000000000000)
  %v423 = select <8 x i1> %v368, <8 x double> splat (double 0x4000000000000000), <8 x double> %v422
  %v424 = getelementptr inbounds <8 x double>, ptr %lanes, i64 12
  store <8 x double> %v423, ptr %v424, align 64
  br label %done
done:
  %v425 = shl i64 %v371, 8
  %v426 = or i64 %v300, %v425
  ret i64 %v426
}

define i64 @uq_observe(ptr noalias %lanes, ptr noalias readonly %settings, i64 %due, i64 %strict) #0 {
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
  %due.now = phi <8 x i1> [ %v4, %entry ], [ %due.then, %values ]
  %at.now = phi <8 x double> [ %v8, %entry ], [ %at.then, %values ]
  %clock.now = phi <8 x i64> [ %v10, %entry ], [ %clock.then, %values ]
  %place.now = phi <8 x i64> [ %v12, %entry ], [ %place.then, %values ]
  %truth_place.now = phi <8 x i64> [ %v14, %entry ], [ %truth_place.then, %values ]
  %strayed.now = phi <8 x i1> [ zeroinitializer, %entry ], [ %strayed.then, %values ]
  %v15 = getelementptr inbounds <8 x double>, ptr %settings, i64 5
  %v16 = load <8 x double>, ptr %v15, align 64
  %v17 = fcmp ogt <8 x double> %v16, splat (double 0x0000000000000000)
  %v18 = bitcast <8 x i1> %v17 to i8
  %v19 = icmp ne i8 %v18, 0
  br i1 %v19, label %judge, label %values
judge:
  %v20 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v21 = load <8 x double>, ptr %v20, align 64
  %v22 = fsub <8 x double> %at.now, %v21
  %v23 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v24 = load <8 x double>, ptr %v23, align 64
  %v25 = fdiv <8 x double> %v22, %v24
  %v26 = fsub <8 x double> splat (double 0x3FF0000000000000), %v25
  %v27 = fcmp oge <8 x double> %at.now, %v2
  %v28 = getelementptr inbounds <8 x double>, ptr %lanes, i64 39
  %v29 = load <8 x double>, ptr %v28, align 64
  %v30 = getelementptr inbounds <8 x double>, ptr %lanes, i64 37
  %v31 = load <8 x double>, ptr %v30, align 64
  %v32 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> %v29, <8 x double> %v31)
  %v33 = getelementptr inbounds <8 x double>, ptr %lanes, i64 35
  %v34 = load <8 x double>, ptr %v33, align 64
  %v35 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v32, <8 x double> %v34)
  %v36 = getelementptr inbounds <8 x double>, ptr %lanes, i64 33
  %v37 = load <8 x double>, ptr %v36, align 64
  %v38 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> %v35, <8 x double> %v37)
  %v39 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  %v40 = load <8 x double>, ptr %v39, align 64
  %v41 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v38, <8 x double> %v40)
  %v42 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  %v43 = load <8 x double>, ptr %v42, align 64
  %v44 = select <8 x i1> %v27, <8 x double> %v43, <8 x double> %v41
  %v45 = getelementptr inbounds <8 x double>, ptr %settings, i64 11
  %v46 = load <8 x double>, ptr %v45, align 64
  %v47 = fcmp olt <8 x double> %v44, %v46
  %v48 = or <8 x i1> zeroinitializer, %v47
  %v49 = getelementptr inbounds <8 x double>, ptr %settings, i64 13
  %v50 = load <8 x double>, ptr %v49, align 64
  %v51 = fcmp ogt <8 x double> %v44, %v50
  %v52 = or <8 x i1> %v48, %v51
  %v53 = getelementptr inbounds <8 x double>, ptr %lanes, i64 40
  %v54 = load <8 x double>, ptr %v53, align 64
  %v55 = getelementptr inbounds <8 x double>, ptr %lanes, i64 38
  %v56 = load <8 x double>, ptr %v55, align 64
  %v57 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> %v54, <8 x double> %v56)
  %v58 = getelementptr inbounds <8 x double>, ptr %lanes, i64 36
  %v59 = load <8 x double>, ptr %v58, align 64
  %v60 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v57, <8 x double> %v59)
  %v61 = getelementptr inbounds <8 x double>, ptr %lanes, i64 34
  %v62 = load <8 x double>, ptr %v61, align 64
  %v63 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v26, <8 x double> %v60, <8 x double> %v62)
  %v64 = getelementptr inbounds <8 x double>, ptr %lanes, i64 32
  %v65 = load <8 x double>, ptr %v64, align 64
  %v66 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v25, <8 x double> %v63, <8 x double> %v65)
  %v67 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  %v68 = load <8 x double>, ptr %v67, align 64
  %v69 = select <8 x i1> %v27, <8 x double> %v68, <8 x double> %v66
  %v70 = getelementptr inbounds <8 x double>, ptr %settings, i64 12
  %v71 = load <8 x double>, ptr %v70, align 64
  %v72 = fcmp olt <8 x double> %v69, %v71
  %v73 = or <8 x i1> %v52, %v72
  %v74 = getelementptr inbounds <8 x double>, ptr %settings, i64 14
  %v75 = load <8 x double>, ptr %v74, align 64
  %v76 = fcmp ogt <8 x double> %v69, %v75
  %v77 = or <8 x i1> %v73, %v76
  %v78 = and <8 x i1> %due.now, %v77
  %v79 = xor <8 x i1> %v78, splat (i1 true)
  %v80 = and <8 x i1> %due.now, %v79
  %v81 = or <8 x i1> %strayed.now, %v78
  br label %values
values:
  %due.good = phi <8 x i1> [ %due.now, %next ], [ %v80, %judge ]
  %strayed.then = phi <8 x i1> [ %strayed.now, %next ], [ %v81, %judge ]
  %v82 = getelementptr inbounds <8 x double>, ptr %lanes, i64 4
  %v83 = load <8 x double>, ptr %v82, align 64
  %v84 = fsub <8 x double> %at.now, %v83
  %v85 = getelementptr inbounds <8 x double>, ptr %lanes, i64 5
  %v86 = load <8 x double>, ptr %v85, align 64
  %v87 = fdiv <8 x double> %v84, %v86
  %v88 = fsub <8 x double> splat (double 0x3FF0000000000000), %v87
  %v89 = fcmp oge <8 x double> %at.now, %v2
  %v90 = getelementptr inbounds <8 x double>, ptr %lanes, i64 39
  %v91 = load <8 x double>, ptr %v90, align 64
  %v92 = getelementptr inbounds <8 x double>, ptr %lanes, i64 37
  %v93 = load <8 x double>, ptr %v92, align 64
  %v94 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v88, <8 x double> %v91, <8 x double> %v93)
  %v95 = getelementptr inbounds <8 x double>, ptr %lanes, i64 35
  %v96 = load <8 x double>, ptr %v95, align 64
  %v97 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v87, <8 x double> %v94, <8 x double> %v96)
  %v98 = getelementptr inbounds <8 x double>, ptr %lanes, i64 33
  %v99 = load <8 x double>, ptr %v98, align 64
  %v100 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v88, <8 x double> %v97, <8 x double> %v99)
  %v101 = getelementptr inbounds <8 x double>, ptr %lanes, i64 31
  %v102 = load <8 x double>, ptr %v101, align 64
  %v103 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v87, <8 x double> %v100, <8 x double> %v102)
  %v104 = getelementptr inbounds <8 x double>, ptr %lanes, i64 25
  %v105 = load <8 x double>, ptr %v104, align 64
  %v106 = select <8 x i1> %v89, <8 x double> %v105, <8 x double> %v103
  %v107 = getelementptr inbounds <8 x double>, ptr %lanes, i64 40
  %v108 = load <8 x double>, ptr %v107, align 64
  %v109 = getelementptr inbounds <8 x double>, ptr %lanes, i64 38
  %v110 = load <8 x double>, ptr %v109, align 64
  %v111 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v88, <8 x double> %v108, <8 x double> %v110)
  %v112 = getelementptr inbounds <8 x double>, ptr %lanes, i64 36
  %v113 = load <8 x double>, ptr %v112, align 64
  %v114 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v87, <8 x double> %v111, <8 x double> %v113)
  %v115 = getelementptr inbounds <8 x double>, ptr %lanes, i64 34
  %v116 = load <8 x double>, ptr %v115, align 64
  %v117 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v88, <8 x double> %v114, <8 x double> %v116)
  %v118 = getelementptr inbounds <8 x double>, ptr %lanes, i64 32
  %v119 = load <8 x double>, ptr %v118, align 64
  %v120 = call <8 x double> @llvm.fma.v8f64(<8 x double> %v87, <8 x double> %v117, <8 x double> %v119)
  %v121 = getelementptr inbounds <8 x double>, ptr %lanes, i64 26
  %v122 = load <8 x double>, ptr %v121, align 64
  %v123 = select <8 x i1> %v89, <8 x double> %v122, <8 x double> %v120
  %v124 = getelementptr inbounds <8 x i64>, ptr %settings, i64 8
  %v125 = load <8 x i64>, ptr %v124, align 64
  %v126 = getelementptr inbounds <8 x i64>, ptr %settings, i64 7
  %v127 = load <8 x i64>, ptr %v126, align 64
  %v128 = getelementptr inbounds <8 x i64>, ptr %settings, i64 6
  %v129 = load <8 x i64>, ptr %v128, align 64
  %v130 = select <8 x i1> %due.good, <8 x i64> %place.now, <8 x i64> %v125
  %v131 = extractelement <8 x i64> %v130, i64 0
  %v132 = extractelement <8 x i64> %v130, i64 1
  %v133 = extractelement <8 x i64> %v130, i64 2
  %v134 = extractelement <8 x i64> %v130, i64 3
  %v135 = extractelement <8 x i64> %v130, i64 4
  %v136 = extractelement <8 x i64> %v130, i64 5
  %v137 = extractelement <8 x i64> %v130, i64 6
  %v138 = extractelement <8 x i64> %v130, i64 7
  %v139 = inttoptr i64 %v131 to ptr
  %v140 = inttoptr i64 %v132 to ptr
  %v141 = inttoptr i64 %v133 to ptr
  %v142 = inttoptr i64 %v134 to ptr
  %v143 = inttoptr i64 %v135 to ptr
  %v144 = inttoptr i64 %v136 to ptr
  %v145 = inttoptr i64 %v137 to ptr
  %v146 = inttoptr i64 %v138 to ptr
  %v147 = extractelement <8 x double> %v106, i64 0
  store double %v147, ptr %v139, align 8
  %v148 = extractelement <8 x double> %v106, i64 1
  store double %v148, ptr %v140, align 8
  %v149 = extractelement <8 x double> %v106, i64 2
  store double %v149, ptr %v141, align 8
  %v150 = extractelement <8 x double> %v106, i64 3
  store double %v150, ptr %v142, align 8
  %v151 = extractelement <8 x double> %v106, i64 4
  store double %v151, ptr %v143, align 8
  %v152 = extractelement <8 x double> %v106, i64 5
  store double %v152, ptr %v144, align 8
  %v153 = extractelement <8 x double> %v106, i64 6
  store double %v153, ptr %v145, align 8
  %v154 = extractelement <8 x double> %v106, i64 7
  store double %v154, ptr %v146, align 8
  %v155 = add <8 x i64> %place.now, %v129
  %v156 = select <8 x i1> %due.good, <8 x i64> %v155, <8 x i64> %v125
  %v157 = extractelement <8 x i64> %v156, i64 0
  %v158 = extractelement <8 x i64> %v156, i64 1
  %v159 = extractelement <8 x i64> %v156, i64 2
  %v160 = extractelement <8 x i64> %v156, i64 3
  %v161 = extractelement <8 x i64> %v156, i64 4
  %v162 = extractelement <8 x i64> %v156, i64 5
  %v163 = extractelement <8 x i64> %v156, i64 6
  %v164 = extractelement <8 x i64> %v156, i64 7
  %v165 = inttoptr i64 %v157 to ptr
  %v166 = inttoptr i64 %v158 to ptr
  %v167 = inttoptr i64 %v159 to ptr
  %v168 = inttoptr i64 %v160 to ptr
  %v169 = inttoptr i64 %v161 to ptr
  %v170 = inttoptr i64 %v162 to ptr
  %v171 = inttoptr i64 %v163 to ptr
  %v172 = inttoptr i64 %v164 to ptr
  %v173 = extractelement <8 x double> %v123, i64 0
  store double %v173, ptr %v165, align 8
  %v174 = extractelement <8 x double> %v123, i64 1
  store double %v174, ptr %v166, align 8
  %v175 = extractelement <8 x double> %v123, i64 2
  store double %v175, ptr %v167, align 8
  %v176 = extractelement <8 x double> %v123, i64 3
  store double %v176, ptr %v168, align 8
  %v177 = extractelement <8 x double> %v123, i64 4
  store double %v177, ptr %v169, align 8
  %v178 = extractelement <8 x double> %v123, i64 5
  store double %v178, ptr %v170, align 8
  %v179 = extractelement <8 x double> %v123, i64 6
  store double %v179, ptr %v171, align 8
  %v180 = extractelement <8 x double> %v123, i64 7
  store double %v180, ptr %v172, align 8
  %v181 = add <8 x i64> %v155, %v129
  %v182 = select <8 x i1> %due.good, <8 x i64> splat (i64 8), <8 x i64> zeroinitializer
  %clock.then = add <8 x i64> %clock.now, %v182
  %place.then = add <8 x i64> %place.now, %v182
  %v183 = select <8 x i1> %due.good, <8 x i64> splat (i64 1), <8 x i64> zeroinitializer
  %truth_place.then = add <8 x i64> %truth_place.now, %v183
  %v184 = extractelement <8 x i64> %clock.then, i64 0
  %v185 = extractelement <8 x i64> %clock.then, i64 1
  %v186 = extractelement <8 x i64> %clock.then, i64 2
  %v187 = extractelement <8 x i64> %clock.then, i64 3
  %v188 = extractelement <8 x i64> %clock.then, i64 4
  %v189 = extractelement <8 x i64> %clock.then, i64 5
  %v190 = extractelement <8 x i64> %clock.then, i64 6
  %v191 = extractelement <8 x i64> %clock.then, i64 7
  %v192 = inttoptr i64 %v184 to ptr
  %v193 = inttoptr i64 %v185 to ptr
  %v194 = inttoptr i64 %v186 to ptr
  %v195 = inttoptr i64 %v187 to ptr
  %v196 = inttoptr i64 %v188 to ptr
  %v197 = inttoptr i64 %v189 to ptr
  %v198 = inttoptr i64 %v190 to ptr
  %v199 = inttoptr i64 %v191 to ptr
  %v200 = load double, ptr %v192, align 8
  %v201 = insertelement <8 x double> poison, double %v200, i64 0
  %v202 = load double, ptr %v193, align 8
  %v203 = insertelement <8 x double> %v201, double %v202, i64 1
  %v204 = load double, ptr %v194, align 8
  %v205 = insertelement <8 x double> %v203, double %v204, i64 2
  %v206 = load double, ptr %v195, align 8
  %v207 = insertelement <8 x double> %v205, double %v206, i64 3
  %v208 = load double, ptr %v196, align 8
  %v209 = insertelement <8 x double> %v207, double %v208, i64 4
  %v210 = load double, ptr %v197, align 8
  %v211 = insertelement <8 x double> %v209, double %v210, i64 5
  %v212 = load double, ptr %v198, align 8
  %v213 = insertelement <8 x double> %v211, double %v212, i64 6
  %v214 = load double, ptr %v199, align 8
  %v215 = insertelement <8 x double> %v213, double %v214, i64 7
  %at.then = select <8 x i1> %due.good, <8 x double> %v215, <8 x double> %at.now
  %v216 = fcmp olt <8 x double> %at.then, %v2
  %v217 = fcmp ole <8 x double> %at.then, %v2
  %v218 = select <8 x i1> %v6, <8 x i1> %v216, <8 x i1> %v217
  %due.then = and <8 x i1> %due.good, %v218
  %v219 = bitcast <8 x i1> %due.then to i8
  %v220 = icmp ne i8 %v219, 0
  br i1 %v220, label %next, label %done
done:
  %v221 = getelementptr inbounds <8 x double>, ptr %lanes, i64 3
  store <8 x double> %at.then, ptr %v221, align 64
  %v222 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 15
  store <8 x i64> %clock.then, ptr %v222, align 64
  %v223 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 16
  store <8 x i64> %place.then, ptr %v223, align 64
  %v224 = getelementptr inbounds <8 x i64>, ptr %lanes, i64 17
  store <8 x i64> %truth_place.then, ptr %v224, align 64
  %v225 = select <8 x i1> %strayed.then, <8 x double> %at.then, <8 x double> %v2
  %v226 = getelementptr inbounds <8 x double>, ptr %lanes, i64 0
  store <8 x double> %v225, ptr %v226, align 64
  %v227 = bitcast <8 x i1> %strayed.then to i8
  %v228 = zext i8 %v227 to i64
  ret i64 %v228
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
attributes #1 = { nounwind alignstack=64 }
